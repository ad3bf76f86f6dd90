import { describe, expect, it } from 'vitest';
import { FAILURE_CODES, Failure } from '@/lib/access';
import { PROBLEMS, faultResponse, problemResponse } from '@/lib/http/problem';

describe('a problem document', () => {
  it.each(FAILURE_CODES.map((code) => [code]))(
    'for %s has all members of RFC 9457',
    async (code) => {
      const response = problemResponse(new Failure(code, 'What was met.'), 'n-1');
      expect(response.status).toBe(PROBLEMS[code].status);
      expect(response.status).toBeGreaterThanOrEqual(400);
      expect(response.status).toBeLessThan(600);
      expect(response.headers.get('content-type')).toMatch(/^application\/problem\+json/);
      expect(response.headers.get('cache-control')).toBe('no-store');
      expect(await response.json()).toEqual({
        type: `tag:surdwork.example,2026:problem/${code}`,
        title: PROBLEMS[code].title,
        status: response.status,
        detail: 'What was met.',
        code,
        requestId: 'n-1',
      });
    },
  );

  it('keeps asking to sign in, being forbidden and not being there apart', () => {
    const statuses = (['sign-in-needed', 'forbidden', 'not-found'] as const).map(
      (code) => PROBLEMS[code].status,
    );
    expect(statuses).toEqual([401, 403, 404]);
  });

  it('says how long to wait, how to bring a key, and what the head is', async () => {
    const wait = problemResponse(new Failure('too-many', 'Wait.', { retryAfter: 9 }), 'n');
    expect(wait.headers.get('retry-after')).toBe('9');
    const key = problemResponse(new Failure('bad-key', 'No.'), 'n');
    expect(key.headers.get('www-authenticate')).toBe('Bearer');
    const stale = problemResponse(
      new Failure('stale-version', 'No.', { head: { number: 2 } }),
      'n',
    );
    expect(await stale.json()).toMatchObject({ head: { number: 2 } });
  });

  it('for a fault of ours tells its number and nothing of the cause', async () => {
    const response = faultResponse('n-7');
    expect(response.status).toBe(500);
    expect(await response.json()).toMatchObject({ code: 'fault', requestId: 'n-7' });
  });
});
