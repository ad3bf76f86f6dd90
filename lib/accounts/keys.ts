import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  findLiveApiKey,
  insertApiKey,
  listApiKeys,
  recordApiKeyUsed,
  revokeApiKey,
  type ApiKey,
} from '@/db/queries/api-keys';
import { findUser, lockUser } from '@/db/queries/users';
import { Failure, KEY_SCOPES, type KeyScope } from '@/lib/access';
import { oneLine } from './fields';
import { recordForAccount } from './happenings';
import { isId } from './ids';
import { hashOf, newSecret } from './secrets';
import type { ApiKeyLine, NewApiKey, Person } from './types';

/** Marks a text as one of our keys, for people and for programs that look for leaked secrets. */
const PREFIX = 'swk_';
const SHAPE = /^swk_[A-Za-z0-9_-]{43}$/;
const FRAGMENT = 6;
const LIVE_KEYS = 20;
const DAY_MS = 24 * 3600 * 1000;
/** A key in steady use writes its last use no oftener than this. */
const USE_RECORDED_EVERY_MS = 60_000;

export const KeyRequest = z.strictObject({
  label: oneLine('The label', 120),
  scopes: z
    .array(z.enum(KEY_SCOPES, { error: `A scope is one of ${KEY_SCOPES.join(', ')}.` }))
    .min(1, { error: 'A key without a scope is good for nothing; choose one at least.' })
    .max(KEY_SCOPES.length, { error: 'A scope is given twice.' })
    .refine((scopes) => new Set(scopes).size === scopes.length, {
      error: 'A scope is given twice.',
    })
    .default(['evaluate']),
  expiresInDays: z
    .int({ error: 'The number of days must be a whole number.' })
    .min(1, { error: 'A key is valid for at least 1 day.' })
    .max(3650, { error: 'A key is valid for at most 3650 days.' })
    .optional(),
});
export type KeyRequest = z.infer<typeof KeyRequest>;

export async function listKeys(person: Person): Promise<ApiKeyLine[]> {
  return (await listApiKeys(database(), person.id)).map(toLine);
}

/**
 * Makes a key. The answer is the only place where the key itself ever appears.
 * @throws Failure `limit-reached` above 20 live keys
 */
export async function createKey(person: Person, request: KeyRequest): Promise<NewApiKey> {
  const key = PREFIX + newSecret();
  const days = request.expiresInDays;
  return inTransaction(async (trx) => {
    // Held, so that of two keys made at once the second sees the first.
    await lockUser(trx, person.id);
    const live = (await listApiKeys(trx, person.id)).filter((one) => isLive(one, Date.now()));
    if (live.length >= LIVE_KEYS) {
      throw new Failure(
        'limit-reached',
        `You have ${live.length} keys in use; at most ${LIVE_KEYS} are allowed. Revoke one first.`,
      );
    }
    const id = await insertApiKey(trx, {
      userId: person.id,
      label: request.label,
      keyHash: hashOf(key),
      fragment: key.slice(-FRAGMENT),
      scopes: request.scopes,
      expiresAt: days === undefined ? null : new Date(Date.now() + days * DAY_MS),
    });
    const made = (await listApiKeys(trx, person.id)).find((line) => line.id === id);
    if (made === undefined) throw new Error('A key vanished while it was being made.');
    await recordForAccount(trx, {
      ...aboutKey(person),
      deed: 'key.made',
      subject: request.label,
      details: { for: request.scopes.join(' and ') },
    });
    return { ...toLine(made), key };
  });
}

const aboutKey = ({ id }: Person) => ({ accountId: id, by: id });

/** @throws Failure `not-found` when the person has no such live key */
export async function revokeKey(person: Person, id: string): Promise<void> {
  const isDone = await inTransaction(async (trx) => {
    if (!isId(id) || !(await revokeApiKey(trx, person.id, id))) return false;
    const label = (await listApiKeys(trx, person.id)).find((key) => key.id === id)?.label ?? '';
    await recordForAccount(trx, { ...aboutKey(person), deed: 'key.revoked', subject: label });
    return true;
  });
  if (isDone) return;
  throw new Failure('not-found', 'You have no such key, or it is revoked already.');
}

export interface KeyHolder {
  keyId: string;
  person: Person;
  scopes: KeyScope[];
}

/**
 * Who stands behind a key as it was sent; null for whatever is not a live key. Keys are found by
 * their SHA-256, so the time of the comparison says nothing about the key.
 */
export async function holderOfKey(sent: string): Promise<KeyHolder | null> {
  if (!SHAPE.test(sent)) return null;
  const db = database();
  const key = await findLiveApiKey(db, hashOf(sent));
  if (key === null) return null;
  const user = await findUser(db, key.userId);
  if (user === null) return null;
  if (Date.now() - (key.lastUsedAt?.getTime() ?? 0) > USE_RECORDED_EVERY_MS) {
    await recordApiKeyUsed(db, key.id);
  }
  const person = { id: user.id, name: user.name, email: user.email };
  return { keyId: key.id, person, scopes: key.scopes.filter(isScope) };
}

const isScope = (scope: string): scope is KeyScope => KEY_SCOPES.some((known) => known === scope);

const isLive = (key: ApiKey, now: number) =>
  key.revokedAt === null && (key.expiresAt === null || key.expiresAt.getTime() > now);

const toLine = (key: ApiKey): ApiKeyLine => ({
  id: key.id,
  label: key.label,
  fragment: key.fragment,
  scopes: key.scopes.filter(isScope),
  madeAt: key.createdAt.toISOString(),
  expiresAt: key.expiresAt?.toISOString() ?? null,
  lastUsedAt: key.lastUsedAt?.toISOString() ?? null,
  revokedAt: key.revokedAt?.toISOString() ?? null,
});
