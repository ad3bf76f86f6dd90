import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  deleteBelongings,
  deleteEmptyWorkshop,
  deleteNotebook,
  lockOwned,
  lockWorkshops,
} from '@/db/queries/leaving';
import { findUser, lockUser, makeUserAnonymous } from '@/db/queries/users';
import { Failure, type FieldFault } from '@/lib/access';
import { queueLetter } from '@/lib/mail';
import { EmailAddress } from './fields';
import { recordForAccount } from './happenings';
import { farewellLetter } from './letters';
import { demandPassword } from './new-password';
import type { Person } from './types';

export const Deletion = z.strictObject({
  password: z.string().max(1000).optional(),
  email: EmailAddress.optional(),
});
export type Deletion = z.infer<typeof Deletion>;

/** How the person proves that they mean it: by the password, or where there is none by the address. */
export async function hasPassword(person: Person): Promise<boolean> {
  return (await findUser(database(), person.id))?.passwordHash !== null;
}

/**
 * Deletes a person's account. Notebooks and workshops that only they are in go with it. What they
 * wrote elsewhere stays under “former member”, and so do client links they made on notebooks of others.
 * @throws Failure `invalid` without the right password or address; `too-many`; `still-needed` with
 *   one field for each notebook or workshop that would be left without an owner or admin
 */
export async function deleteAccount(person: Person, sent: Deletion): Promise<void> {
  if (await hasPassword(person)) await demandPassword(person, sent.password ?? '', 'password');
  else demandAddress(person, sent.email);
  await inTransaction(async (trx) => {
    if ((await lockUser(trx, person.id)) === null) return;
    const notebooks = await lockOwned(trx, person.id);
    const workshops = await lockWorkshops(trx, person.id);
    refuseWhileNeeded([
      ...notebooks
        .filter(({ others, peers }) => others > 0 && peers === 0)
        .map(({ id, name }) => ({
          field: `notebook ${id}`,
          message: `You are the only owner of the notebook “${name}”, which others are on: make one of them an owner first.`,
        })),
      ...workshops
        .filter(({ others, peers }) => others > 0 && peers === 0)
        .map(({ id, name }) => ({
          field: `workshop ${id}`,
          message: `You are the only admin of the workshop “${name}”, which has other members: make one of them an admin first.`,
        })),
    ]);
    // Before the memberships go, which say whose record it belongs to.
    await recordForAccount(trx, { deed: 'account.deleted', accountId: person.id, by: person.id });
    for (const { id, others } of notebooks) if (others === 0) await deleteNotebook(trx, id);
    await deleteBelongings(trx, person);
    for (const { id, others } of workshops) if (others === 0) await deleteEmptyWorkshop(trx, id);
    await makeUserAnonymous(trx, person.id);
    await queueLetter(trx, farewellLetter(person));
  });
}

function demandAddress(person: Person, sent: string | undefined): void {
  if (sent === person.email) return;
  const message = 'Type the e-mail address of your account to delete it.';
  throw new Failure('invalid', message, { fields: [{ field: 'email', message }] });
}

function refuseWhileNeeded(fields: FieldFault[]): void {
  const [first] = fields;
  if (first === undefined) return;
  const more = fields.length > 1 ? ` (and ${fields.length - 1} more)` : '';
  throw new Failure('still-needed', `${first.message}${more}`, { fields });
}
