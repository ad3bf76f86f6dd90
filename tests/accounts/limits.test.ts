import { randomUUID } from 'node:crypto';
import { afterAll, afterEach, describe, expect, it, vi } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { Failure } from '@/lib/access';
import { countAgainst, forget, takeBack, type Limit } from '@/lib/accounts/limits';

afterEach(() => vi.useRealTimers());
afterAll(closeDatabase);

const limit: Limit = { name: 'test', hits: 5, seconds: 600, what: 'tries' };
const WINDOW = limit.seconds * 1000;

/** Only the clock is ours; the counting is MariaDB's. */
function at(milliseconds: number): void {
  vi.useFakeTimers({ toFake: ['Date'], now: milliseconds });
}

async function failureOf(subject: string): Promise<Failure | null> {
  try {
    await countAgainst(limit, subject);
    return null;
  } catch (error) {
    if (error instanceof Failure) return error;
    throw error;
  }
}

const start = Math.ceil(Date.now() / WINDOW) * WINDOW;

describe('a limit', () => {
  it('lets exactly its number of hits through, and others unharmed', async () => {
    at(start);
    const subject = randomUUID();
    for (let hit = 0; hit < limit.hits; hit += 1) expect(await failureOf(subject)).toBeNull();
    expect((await failureOf(subject))?.code).toBe('too-many');
    expect(await failureOf(randomUUID())).toBeNull();
  });

  it('lets no more than its number through when all come at once', async () => {
    const subject = randomUUID();
    const answers = await Promise.all(Array.from({ length: 20 }, () => failureOf(subject)));
    expect(answers.filter((failure) => failure === null).length).toBeLessThanOrEqual(limit.hits);
    expect(answers.filter((failure) => failure !== null).length).toBeGreaterThanOrEqual(15);
  });

  it('is not doubled across the seam of two windows', async () => {
    const subject = randomUUID();
    at(start + WINDOW - 1000);
    for (let hit = 0; hit < limit.hits; hit += 1) expect(await failureOf(subject)).toBeNull();
    at(start + WINDOW + 1000);
    expect((await failureOf(subject))?.code).toBe('too-many');
  });

  it('lets the next hit through after the wait it names', async () => {
    const subject = randomUUID();
    at(start + 1000);
    for (let hit = 0; hit < limit.hits; hit += 1) await countAgainst(limit, subject);
    const failure = await failureOf(subject);
    const wait = failure?.extra.retryAfter ?? 0;
    expect(wait).toBeGreaterThan(0);
    expect(failure?.message).toMatch(
      /^Too many tries: 5 are allowed in 10 minutes\. Try again in /,
    );
    at(start + 1000 + wait * 1000);
    expect(await failureOf(subject)).toBeNull();
  });

  it('gives back a hit that was rightful, and forgets all on demand', async () => {
    at(start);
    const subject = randomUUID();
    for (let round = 0; round < 20; round += 1) await takeBack(await countAgainst(limit, subject));
    for (let hit = 0; hit < limit.hits; hit += 1) await countAgainst(limit, subject);
    expect((await failureOf(subject))?.code).toBe('too-many');
    await forget(limit, subject);
    expect(await failureOf(subject)).toBeNull();
  });

  it('keeps no subject in the clear', async () => {
    const subject = `maren.${randomUUID()}@oldacre.example`;
    await countAgainst(limit, subject);
    const rows: { bucket: string }[] = await database()('rate_limits').select('bucket');
    expect(rows.length).toBeGreaterThan(0);
    expect(rows.filter(({ bucket }) => bucket.includes('maren'))).toEqual([]);
  });
});
