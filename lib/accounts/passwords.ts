import { randomBytes } from 'node:crypto';
import { hash, verify, type Options } from '@node-rs/argon2';

/**
 * Argon2id, which is the package's default algorithm, with 19 MiB, 2 passes and 1 lane: one of the
 * settings that OWASP's password storage cheat sheet recommends.
 */
const OPTIONS: Options = {
  memoryCost: 19_456,
  timeCost: 2,
  parallelism: 1,
};

export const PASSWORD_LENGTH = { min: 12, max: 200 } as const;

export function hashPassword(password: string): Promise<string> {
  return hash(password, OPTIONS);
}

let decoy: Promise<string> | undefined;

/**
 * Whether the password belongs to the hash. Where there is no such person (`null`), the same work is
 * done on a hash nobody knows the password of, so that the time taken tells nothing.
 */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword(randomBytes(32).toString('base64'));
  const matches = await verify(stored ?? (await decoy), password);
  return stored !== null && matches;
}
