import { eq } from 'drizzle-orm';
import { person } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { updateMeInput } from '@/lib/schemas/people';
import { personVerb } from '../verb';

export const updateMe = personVerb({
  input: updateMeInput,
  run: async ({ tx, person: me, input }) => {
    const change = {
      ...(input.name === undefined ? {} : { name: input.name }),
      ...(input.units === undefined
        ? {}
        : { units: input.units, locale: input.units === 'metric' ? 'en-GB' : 'en-US' }),
      ...(input.paper === undefined ? {} : { paper: input.paper }),
      ...(input.timeZone === undefined ? {} : { timeZone: input.timeZone }),
      ...(input.mailHour === undefined ? {} : { mailHour: input.mailHour }),
    };
    if (Object.keys(change).length > 0) await tx.update(person).set(change).where(eq(person.id, me.id));
    const [row] = await tx
      .select({
        id: person.id,
        name: person.name,
        email: person.email,
        units: person.units,
        paper: person.paper,
        timeZone: person.timeZone,
        mailHour: person.mailHour,
      })
      .from(person)
      .where(eq(person.id, me.id));
    if (!row) throw notFound();
    return row;
  },
});
