import { addressTaken, addressTakenExample } from './address-taken';
import { batchReady, batchReadyExample } from './batch-ready';
import { invitation, invitationExample } from './invitation';
import { passwordChanged, passwordChangedExample } from './password-changed';
import { reminderDigest, reminderDigestExample } from './reminder-digest';
import { reminderDue, reminderDueExample } from './reminder-due';
import { reportReady, reportReadyExample } from './report-ready';
import { resetPassword, resetPasswordExample } from './reset-password';
import type { Email } from './types';
import { verifyAddress, verifyAddressExample } from './verify-address';

/** Every message with example values: for the gallery and for the checks that hold for all of them. */
export const emailExamples: Readonly<Record<string, () => Promise<Email>>> = {
  verifyAddress: () => verifyAddress(verifyAddressExample),
  addressTaken: () => addressTaken(addressTakenExample),
  resetPassword: () => resetPassword(resetPasswordExample),
  passwordChanged: () => passwordChanged(passwordChangedExample),
  invitation: () => invitation(invitationExample),
  reminderDue: () => reminderDue(reminderDueExample),
  reminderDigest: () => reminderDigest(reminderDigestExample),
  reportReady: () => reportReady(reportReadyExample),
  batchReady: () => batchReady(batchReadyExample),
  batchReadyNothing: () =>
    batchReady({ ...batchReadyExample, files: 5, toReview: 0, samples: 0, notRead: 2, notTaken: 2, missing: 1 }),
  reportNotRead: () =>
    reportReady({
      ...reportReadyExample,
      plotNames: [],
      sampledOn: null,
      outcome: { kind: 'not-read', sentence: 'The file is locked with a password.' },
    }),
};
