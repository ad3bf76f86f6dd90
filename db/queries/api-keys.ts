import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface ApiKey {
  id: string;
  userId: string;
  label: string;
  /** The visible end of the key, by which its owner knows it again. */
  fragment: string;
  scopes: string[];
  createdAt: Date;
  expiresAt: Date | null;
  lastUsedAt: Date | null;
  revokedAt: Date | null;
}

interface ApiKeyRow {
  id: string;
  user_id: string;
  label: string;
  fragment: string;
  scopes: string;
  created_at: Date;
  expires_at: Date | null;
  last_used_at: Date | null;
  revoked_at: Date | null;
}

const toApiKey = (row: ApiKeyRow): ApiKey => ({
  id: row.id,
  userId: row.user_id,
  label: row.label,
  fragment: row.fragment,
  scopes: JSON.parse(row.scopes) as string[],
  createdAt: row.created_at,
  expiresAt: row.expires_at,
  lastUsedAt: row.last_used_at,
  revokedAt: row.revoked_at,
});

export interface NewApiKey {
  userId: string;
  label: string;
  /** SHA-256 of the key in hexadecimal; the key itself is never stored. */
  keyHash: string;
  fragment: string;
  scopes: string[];
  expiresAt: Date | null;
}

/** Stores a key by its hash and returns the new id. */
export async function insertApiKey(db: Database, key: NewApiKey): Promise<string> {
  const id = randomUUID();
  await db('api_keys').insert({
    id,
    user_id: key.userId,
    label: key.label,
    key_hash: key.keyHash,
    fragment: key.fragment,
    scopes: JSON.stringify(key.scopes),
    expires_at: key.expiresAt,
  });
  return id;
}

/** A person's keys, revoked and expired ones too, newest first. */
export async function listApiKeys(db: Database, userId: string): Promise<ApiKey[]> {
  const rows = await db<ApiKeyRow>('api_keys')
    .where({ user_id: userId })
    .orderBy([{ column: 'created_at', order: 'desc' }, 'id']);
  return rows.map(toApiKey);
}

/** The key with this hash, unless it was revoked or its time is over. */
export async function findLiveApiKey(db: Database, keyHash: string): Promise<ApiKey | null> {
  const row = (await db('api_keys')
    .where({ key_hash: keyHash, revoked_at: null })
    .where((expiry) => {
      void expiry.whereNull('expires_at').orWhere('expires_at', '>', db.fn.now(3));
    })
    .first()) as ApiKeyRow | undefined;
  return row === undefined ? null : toApiKey(row);
}

/** Notes that a key was used now. */
export async function recordApiKeyUsed(db: Database, id: string): Promise<void> {
  await db('api_keys')
    .where({ id })
    .update({ last_used_at: db.raw('current_timestamp(3)') });
}

/** Ends a key of the person at once; false when the person has no such live key. */
export async function revokeApiKey(db: Database, userId: string, id: string): Promise<boolean> {
  const ended = await db('api_keys')
    .where({ id, user_id: userId, revoked_at: null })
    .update({ revoked_at: db.raw('current_timestamp(3)') });
  return ended > 0;
}
