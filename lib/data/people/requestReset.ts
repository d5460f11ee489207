import { addressInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { findPerson } from './findPerson';
import { maySendReset, spendPlace } from './limiter';
import { mailReset } from './mails';

/** Changes nothing about the account, and answers the same for every address. */
export const requestReset = publicVerb({
  input: addressInput,
  run: async ({ ctx, input }) => {
    await spendPlace(ctx);
    const send = await maySendReset(input.email);
    await withPeople(async (tx) => {
      const row = await findPerson(tx, input.email);
      if (row && !row.disabledAt && send) await mailReset(tx, ctx, row);
    });
    return { email: input.email };
  },
});
