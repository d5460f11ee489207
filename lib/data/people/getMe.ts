import { nothingSchema } from '@/lib/schemas/parts';
import type { Me } from '@/lib/schemas/people';
import { openPersonVerb } from '../verb';

export const getMe = openPersonVerb({
  input: nothingSchema,
  run: async ({ person }): Promise<Me> => ({
    id: person.id,
    name: person.name,
    email: person.email,
    units: person.units,
    paper: person.paper,
    timeZone: person.timeZone,
    mailHour: person.mailHour,
  }),
});
