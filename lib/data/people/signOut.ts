import { nothingSchema } from '@/lib/schemas/parts';
import { publicVerb } from '../verb';
import { blankCookie, closeSession } from './session';

/** Also for a browser whose session is over already: the cookie goes either way. */
export const signOut = publicVerb({
  input: nothingSchema,
  run: async ({ ctx }) => {
    if (ctx.actor.kind === 'person') await closeSession(ctx, ctx.actor.sessionId);
    return blankCookie();
  },
});
