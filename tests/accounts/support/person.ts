import { randomUUID } from 'node:crypto';
import { database, inTransaction } from '@/db/client';
import { hashPassword, type Person } from '@/lib/accounts';
import { makeAccount } from '@/lib/accounts/sign-up';

export const PASSWORD = 'trammel and straightedge';
let passwordHash: Promise<string> | undefined;

/** Somebody with a confirmed account and a workshop of their own, put into the database directly. */
export async function newPerson(
  name = 'Maren Oldacre',
  { workshop = 'Oldacre Joinery', password = true } = {},
): Promise<Person> {
  passwordHash ??= hashPassword(PASSWORD);
  const email = `${randomUUID()}@oldacre.example`;
  const hash = password ? await passwordHash : null;
  const id = await inTransaction(
    (trx) => makeAccount(trx, { name, email, passwordHash: hash, workshop }),
    database(),
  );
  return { id, name, email };
}
