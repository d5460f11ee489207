import { linkInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { lookAtToken } from './tokens';

export const lookAtReset = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => ({ email: (await lookAtToken(tx, ctx, 'reset-password', input.token)).email })),
});
