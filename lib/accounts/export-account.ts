import { database } from '@/db/client';
import { listCommentsBy } from '@/db/queries/comments';
import { listIdentities } from '@/db/queries/identities';
import { listNotebooksOf } from '@/db/queries/notebooks';
import { findUser } from '@/db/queries/users';
import { findVersion } from '@/db/queries/versions';
import { listWorkshopsOf } from '@/db/queries/workshops';
import { recordForAccount } from './happenings';
import { listKeys } from './keys';
import { LIMITS, countAgainst } from './limits';
import { listSessions } from './sessions';
import type { Person } from './types';

/** Number of the shape below; it counts up when a field changes its meaning. */
const FORMAT = 1;

/**
 * Everything that is stored about a person, as plain data: the account, its workshops, the roles on
 * notebooks with the current content of those the person owns, what they said in comments, keys and sessions without secrets.
 * @throws Failure `too-many`
 */
export async function exportAccount(person: Person): Promise<object> {
  await countAgainst(LIMITS.accountExport, person.id);
  const db = database();
  const user = await findUser(db, person.id);
  const [workshops, used, archived, comments, keys, sessions, identities] = await Promise.all([
    listWorkshopsOf(db, person.id),
    listNotebooksOf(db, person.id, { archived: false }),
    listNotebooksOf(db, person.id, { archived: true }),
    listCommentsBy(db, person.id),
    listKeys(person),
    listSessions(person, null),
    listIdentities(db, person.id),
  ]);
  const notebooks = [];
  for (const { id, title, workshop, role, head, archivedAt } of [...used, ...archived]) {
    const version = role === 'owner' ? await findVersion(db, id, head) : null;
    notebooks.push({
      id,
      title,
      workshop: workshop.name,
      role,
      version: head,
      archivedAt: archivedAt?.toISOString() ?? null,
      ...(version === null ? {} : { content: version.content }),
    });
  }
  await recordForAccount(db, { deed: 'account.exported', accountId: person.id, by: person.id });
  return {
    format: FORMAT,
    exportedAt: new Date().toISOString(),
    account: {
      id: person.id,
      name: person.name,
      email: person.email,
      madeAt: user?.createdAt.toISOString() ?? null,
      hasPassword: user?.passwordHash !== null,
      identities: identities.map(({ issuer, linkedAt }) => ({
        issuer,
        linkedAt: linkedAt.toISOString(),
      })),
    },
    workshops: workshops.map(({ id, name, role }) => ({ id, name, role })),
    notebooks,
    comments: comments.map(({ saidAt, ...said }) => ({ ...said, saidAt: saidAt.toISOString() })),
    keys,
    sessions: sessions.map(({ device, begunAt, seenAt }) => ({ device, begunAt, seenAt })),
  };
}
