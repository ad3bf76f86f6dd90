import { createHmac, hkdfSync, timingSafeEqual } from 'node:crypto';
import type { ClientLink } from '@/db/queries/client-links';
import { hashOf } from '@/lib/accounts';
import { env } from '@/lib/env';

/** A key of its own for each purpose, from the one secret of the installation (HKDF, RFC 5869). */
function keyFor(purpose: string): Buffer {
  return Buffer.from(hkdfSync('sha256', env().NEXTAUTH_SECRET, '', `surdwork ${purpose}`, 32));
}

const sign = (purpose: string, text: string): Buffer =>
  createHmac('sha256', keyFor(purpose)).update(text).digest();

/**
 * The token of a link, from its id: 256 bits in base64url. Whoever knows only the database cannot
 * make it, and the server can make it again for a letter or for an owner who lost it.
 */
export function tokenOf(linkId: string): string {
  return sign('client-link', linkId).toString('base64url');
}

/** The page that a token opens. */
export const addressOfToken = (token: string): string =>
  new URL(`/client/${token}`, env().NEXTAUTH_URL).href;

/**
 * The address of a link, or null where it cannot be made again: the link is from before tokens were
 * derived, or the secret of the installation was changed since. Either way it goes on working.
 */
export function addressOfLink({
  id,
  tokenHash,
}: Pick<ClientLink, 'id' | 'tokenHash'>): string | null {
  const token = tokenOf(id);
  return hashOf(token) === tokenHash ? addressOfToken(token) : null;
}

/** How long a passphrase that was given once opens the link for the same browser. */
export const PASS_SECONDS = 12 * 3600;

type Locked = Pick<ClientLink, 'id' | 'passphraseHash'>;

/** What a browser keeps after the right passphrase: good for this link, this passphrase and some hours. */
export function makePass(link: Locked, now = Date.now()): string {
  const until = Math.floor(now / 1000) + PASS_SECONDS;
  return `${until}.${signatureOf(link, until).toString('base64url')}`;
}

/** Whether a browser's pass opens the link; one made for an earlier passphrase does not. */
export function isPass(link: Locked, pass: string | undefined, now = Date.now()): boolean {
  const [, until = '', signature = ''] = /^(\d{1,12})\.([A-Za-z0-9_-]{43})$/.exec(pass ?? '') ?? [];
  if (until === '' || Number(until) * 1000 < now) return false;
  const sent = Buffer.from(signature, 'base64url');
  const right = signatureOf(link, Number(until));
  return sent.length === right.length && timingSafeEqual(sent, right);
}

const signatureOf = ({ id, passphraseHash }: Locked, until: number): Buffer =>
  sign('client-pass', JSON.stringify([id, passphraseHash, until]));
