import { Problem } from '@/lib/errors';
import common from './commonPasswords.json';

const COMMON = new Set(common.words.split(' '));
const PRODUCT = ['loamline', 'loam', 'soiltest', 'soil', 'compost', 'garden', 'gardener', 'allotment', 'password'];

/** `Loamline2026!` is `loamline` to anyone who guesses. */
const stripped = (text: string) => text.replace(/[\d\W_]+$/u, '').replace(/^[\d\W_]+/u, '');

/** Why this password is refused beyond its length, or null. */
export function passwordObjection(password: string, email: string): string | null {
  const plain = password.normalize('NFC').toLowerCase();
  const base = stripped(plain);
  if (COMMON.has(plain) || COMMON.has(base)) {
    return 'This is among the passwords that are tried first everywhere. Choose another; a few words in a row are good.';
  }
  if (PRODUCT.includes(base) || /^(.)\1+$/u.test(plain)) {
    return 'This is easy to guess here. Choose another; a few words in a row are good.';
  }
  const local = email.toLowerCase().split('@')[0] ?? '';
  if (plain === email.toLowerCase() || (local.length >= 4 && base === local)) {
    return 'This is your address. Choose something that is not written in every mail you send.';
  }
  return null;
}

export function assertGoodPassword(password: string, email: string): void {
  const objection = passwordObjection(password, email);
  if (objection) {
    throw new Problem('invalid', 'Some fields need a change; nothing was saved yet.', {
      fields: { password: objection },
    });
  }
}
