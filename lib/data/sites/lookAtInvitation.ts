import { linkInput } from '@/lib/schemas/people';
import { hashSecret } from '../people/secrets';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { readInvitation } from './readInvitation';

/** For whoever holds the link. Looking changes nothing. */
export const lookAtInvitation = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) => withPeople((tx) => readInvitation(tx, ctx, hashSecret(input.token))),
});
