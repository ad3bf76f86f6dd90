import type { Database } from '../client';

/** Who is meant by this subject of this issuer; null while nobody is. */
export async function findIdentity(
  db: Database,
  issuer: string,
  subject: string,
): Promise<string | null> {
  const row: { user_id: string } | undefined = await db('identities')
    .where({ issuer, subject })
    .first('user_id');
  return row?.user_id ?? null;
}

/** @throws what `isDuplicate` recognises when the subject means somebody already */
export async function insertIdentity(
  db: Database,
  identity: { issuer: string; subject: string; userId: string },
): Promise<void> {
  await db('identities').insert({
    issuer: identity.issuer,
    subject: identity.subject,
    user_id: identity.userId,
  });
}

export interface Identity {
  issuer: string;
  linkedAt: Date;
}

export async function listIdentities(db: Database, userId: string): Promise<Identity[]> {
  const rows: { issuer: string; linked_at: Date }[] = await db('identities')
    .where({ user_id: userId })
    .orderBy('linked_at')
    .select('issuer', 'linked_at');
  return rows.map((row) => ({ issuer: row.issuer, linkedAt: row.linked_at }));
}

export async function deleteIdentities(db: Database, userId: string): Promise<void> {
  await db('identities').where({ user_id: userId }).delete();
}
