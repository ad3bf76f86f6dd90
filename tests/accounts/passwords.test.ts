import { describe, expect, it } from 'vitest';
import { hashPassword, verifyPassword } from '@/lib/accounts/passwords';

describe('a password hash', () => {
  it('is argon2id with the named cost, salted, and says nothing of the password', async () => {
    const [first, second] = [
      await hashPassword('a long sentence'),
      await hashPassword('a long sentence'),
    ];
    expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(first).not.toBe(second);
    expect(first).not.toContain('sentence');
  });

  it('is matched by its own password alone', async () => {
    const stored = await hashPassword('a long sentence');
    expect(await verifyPassword(stored, 'a long sentence')).toBe(true);
    expect(await verifyPassword(stored, 'a long sentence ')).toBe(false);
    expect(await verifyPassword(stored, '')).toBe(false);
  });

  it('that is not there is matched by nothing', async () => {
    expect(await verifyPassword(null, '')).toBe(false);
    expect(await verifyPassword(null, 'a long sentence')).toBe(false);
  });

  it('has no collision at the end of a character or of the input', async () => {
    const stored = await hashPassword('é'.repeat(200));
    expect(await verifyPassword(stored, 'é'.repeat(199))).toBe(false);
    expect(await verifyPassword(stored, 'e\u0301'.repeat(200))).toBe(false);
  });
});
