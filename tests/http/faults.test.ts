import { afterEach, expect, it, vi } from 'vitest';
import { logFault } from '@/lib/http/faults';

afterEach(() => vi.restoreAllMocks());

function logged(error: unknown, url = 'http://localhost/api/keys'): string {
  const lines: string[] = [];
  vi.spyOn(console, 'error').mockImplementation((line: string) => lines.push(line));
  logFault(error, new Request(url, { method: 'POST' }), 'n-1');
  return lines.join('\n');
}

it('a fault is one line with the request’s number, its method and its path', () => {
  const line = logged(new TypeError('x is not a function'));
  expect(line).not.toContain('\n');
  expect(JSON.parse(line)).toMatchObject({
    requestId: 'n-1',
    method: 'POST',
    path: '/api/keys',
    fault: { message: 'TypeError: x is not a function' },
  });
});

it('a fault of the database is logged without the statement and its values', () => {
  const error = Object.assign(new Error("insert into `users` values ('maren', 'hash-of-hers')"), {
    errno: 4025,
    sql: "insert into `users` values ('maren', 'hash-of-hers')",
  });
  const line = logged(error);
  expect(line).toContain('database error 4025');
  expect(line).not.toMatch(/maren|hash-of-hers|insert/);
});

it('the token of a client link and the query stay out of the log', () => {
  const line = logged(
    new Error('x'),
    'http://localhost/api/client/secret-token/export?format=json',
  );
  expect(line).toContain('/api/client/…/export');
  expect(line).not.toMatch(/secret-token|format/);
});

it('whatever is thrown that is no error is not written out', () => {
  expect(logged({ password: 'secret' })).not.toContain('secret');
});
