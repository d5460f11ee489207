import { linkInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { lookAtToken } from './tokens';

export const lookAtVerification = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const row = await lookAtToken(tx, ctx, 'verify-address', input.token);
      return { email: row.email, name: row.payload.name ?? '' };
    }),
});
