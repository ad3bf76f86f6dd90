import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits in base64url: 43 characters that go into an address or a header as they are. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url');
}

/**
 * What is stored in place of a secret and looked up when one is shown. Random 256 bits need no salt
 * and no slow hash; and since only hashes are ever compared, the time a comparison takes says
 * nothing that would help to guess the secret.
 */
export function hashOf(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}

/** Whether a text can be a secret of ours at all; whatever else is sent is not looked up. */
export function isSecret(text: string): boolean {
  return /^[A-Za-z0-9_-]{43}$/.test(text);
}
