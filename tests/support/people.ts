import { and, desc, eq } from 'drizzle-orm';
import { outbox, person } from '@/db/schema';
import { database } from '@/lib/data/database';
import { signUp } from '@/lib/data/people/signUp';
import { verifyAddress } from '@/lib/data/people/verifyAddress';
import { asPersonId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import { ctxNobody, type TestPerson } from './factory';

export const GOOD_PASSWORD = 'rake the seed bed twice';

let serial = 0;
export const newAddress = () => {
  serial += 1;
  return `row-${serial}-${Date.now().toString(36)}@garden.test`;
};

/** What refused, so that a test can look at code and sentence; fails when nothing did. */
export async function problemOf(work: Promise<unknown>): Promise<Problem> {
  try {
    await work;
  } catch (error) {
    if (error instanceof Problem) return error;
    throw error;
  }
  throw new Error('This was expected to be refused, and was not.');
}

export async function mailsTo(email: string, kind?: string) {
  return database()
    .select()
    .from(outbox)
    .where(and(eq(outbox.toAddress, email), ...(kind ? [eq(outbox.kind, kind)] : [])))
    .orderBy(desc(outbox.createdAt));
}

/** The secret of the newest mail's link, as its reader would copy it. */
export async function linkIn(email: string, kind: string): Promise<string> {
  const [mail] = await mailsTo(email, kind);
  const secret = mail?.text.match(/\/(?:verify|reset|invitation)\/([\w-]{43})/)?.[1];
  if (!secret) throw new Error(`No ${kind} mail with a link went to ${email}.`);
  return secret;
}

/** A person made the long way: sign-up, mail, confirmed address. */
export async function signUpConfirmed(email = newAddress(), password = GOOD_PASSWORD): Promise<TestPerson> {
  const ctx = await ctxNobody();
  await signUp({ ctx, input: { name: 'Row Keeper', email, password } });
  await verifyAddress({ ctx, input: { token: await linkIn(email, 'verify-address') } });
  const [row] = await database().select().from(person).where(eq(person.email, email));
  if (!row) throw new Error('The account is not there.');
  return { id: asPersonId(row.id), name: row.name, email: row.email };
}
