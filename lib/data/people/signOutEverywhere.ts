import { nothingSchema } from '@/lib/schemas/parts';
import { personVerb } from '../verb';
import { blankCookie, closeAllSessions } from './session';

export const signOutEverywhere = personVerb({
  input: nothingSchema,
  run: async ({ tx, person }) => {
    await closeAllSessions(tx, person.id);
    return blankCookie();
  },
});
