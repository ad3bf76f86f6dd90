import type { Knex } from 'knex';

/** Something that a person alone answers for, or not alone. */
export interface Held {
  id: string;
  name: string;
  /** How many other people are on it. */
  others: number;
  /** How many of them could take over. */
  peers: number;
}

interface PlaceRow {
  place: string;
  user_id: string;
  role: string;
}

/** The notebooks that a person owns, with the others on them; their roles are held. */
export async function lockOwned(trx: Knex.Transaction, userId: string): Promise<Held[]> {
  const mine: { notebook_id: string }[] = await trx('notebook_roles')
    .where({ user_id: userId, role: 'owner' })
    .select('notebook_id');
  const ids = mine.map((row) => row.notebook_id);
  const rows: PlaceRow[] = await trx('notebook_roles')
    .whereIn('notebook_id', ids)
    .forUpdate()
    .select('notebook_id as place', 'user_id', 'role');
  const named: { id: string; name: string }[] = await trx('notebooks')
    .whereIn('id', ids)
    .orderBy('title')
    .select('id', 'title as name');
  return named.map((one) => held(one, rows, userId, 'owner'));
}

/** The workshops that a person is in, with the others in them; their memberships are held. */
export async function lockWorkshops(trx: Knex.Transaction, userId: string): Promise<Held[]> {
  const mine: { workshop_id: string }[] = await trx('memberships')
    .where({ user_id: userId })
    .select('workshop_id');
  const ids = mine.map((row) => row.workshop_id);
  const rows: PlaceRow[] = await trx('memberships')
    .whereIn('workshop_id', ids)
    .forUpdate()
    .select('workshop_id as place', 'user_id', 'role');
  const named: { id: string; name: string }[] = await trx('workshops')
    .whereIn('id', ids)
    .orderBy('name')
    .select('id', 'name');
  return named.map((one) => held(one, rows, userId, 'admin'));
}

function held(
  one: { id: string; name: string },
  rows: readonly PlaceRow[],
  userId: string,
  leading: string,
): Held {
  const others = rows.filter(({ place, user_id }) => place === one.id && user_id !== userId);
  const peers = others.filter(({ role }) => role === leading).length;
  return { ...one, others: others.length, peers };
}

/**
 * Deletes a notebook with all that belongs to it, its issued revisions too. Client links go first,
 * because they lead to revisions; versions go newest first, because they name older ones.
 */
export async function deleteNotebook(trx: Knex.Transaction, id: string): Promise<void> {
  await trx('client_links').where({ notebook_id: id }).delete();
  await trx.raw('delete from versions where notebook_id = ? order by number desc', [id]);
  await trx('notebooks').where({ id }).delete();
}

/** Deletes a workshop, unless a notebook is left in it. */
export async function deleteEmptyWorkshop(trx: Knex.Transaction, id: string): Promise<void> {
  const left: unknown = await trx('notebooks').where({ workshop_id: id }).first('id');
  if (left === undefined) await trx('workshops').where({ id }).delete();
}

/** What hangs on a person and on nothing else. */
const OWN_TABLES = [
  'notebook_roles',
  'memberships',
  'api_keys',
  'sessions',
  'password_resets',
  'identities',
  'presence',
] as const;

/** Takes away every role, key, session and way in that a person has, and what was sent to them. */
export async function deleteBelongings(
  trx: Knex.Transaction,
  person: { id: string; email: string },
): Promise<void> {
  for (const table of OWN_TABLES) await trx(table).where({ user_id: person.id }).delete();
  await trx('invitations').where({ email: person.email }).delete();
  await trx('outgoing_mail').where({ recipient: person.email }).delete();
}
