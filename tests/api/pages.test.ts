import { describe, expect, it } from 'vitest';
import { Visitor, newcomer } from './support/visitor';

const scriptsOf = (html: string) => html.match(/<script\b[^>]*>/g) ?? [];
const nonceOf = (policy: string | null) => /'nonce-([^']+)'/.exec(policy ?? '')?.[1] ?? '';

describe('pages that need a person', () => {
  it.each(['/notebooks', '/notebooks/x/versions/1', '/settings'])(
    'send signed-out people from %s to sign in, and back afterwards',
    async (path) => {
      const answer = await new Visitor().get(`${path}?a=1&b=2`);
      expect(answer.status).toBe(307);
      const location = answer.headers.get('location') ?? '';
      const { pathname, searchParams } = new URL(location, 'http://localhost');
      expect([pathname, searchParams.get('next')]).toEqual(['/sign-in', `${path}?a=1&b=2`]);
    },
  );

  it('stay on the host that was asked, whatever it calls itself', async () => {
    const headers = { 'x-forwarded-host': 'evil.example', host: 'evil.example' };
    const answer = await new Visitor().get('/notebooks', headers);
    expect(answer.headers.get('location')).not.toContain('evil');
  });

  it('open to signed-in people, and no more after the session was ended', async () => {
    const visitor = await newcomer('Maren');
    expect((await visitor.get('/notebooks')).status).toBe(200);
    await visitor.ask('DELETE', '/api/sessions');
    const after = await visitor.get('/notebooks');
    expect(after.text).not.toContain('Maren');
    expect([after.status, after.headers.get('location')]).not.toEqual([200, null]);
  });
});

describe('every page', () => {
  it.each(['/', '/sign-in', '/help', '/no/such/page'])(
    '%s runs only scripts with the nonce of its own answer',
    async (path) => {
      const visitor = new Visitor();
      const [first, second] = [await visitor.get(path), await visitor.get(path)];
      const nonce = nonceOf(first.headers.get('content-security-policy'));
      expect(nonce).toMatch(/^[A-Za-z0-9+/]{22}==$/);
      expect(nonceOf(second.headers.get('content-security-policy'))).not.toBe(nonce);
      const scripts = scriptsOf(first.text);
      expect(scripts.length).toBeGreaterThan(0);
      for (const script of scripts) expect(script).toContain(`nonce="${nonce}"`);
    },
  );

  it('has a strict policy and the other security headers', async () => {
    const { headers } = await new Visitor().get('/');
    const policy = headers.get('content-security-policy') ?? '';
    for (const rule of [
      "default-src 'none'",
      "'strict-dynamic'",
      "object-src 'none'",
      "base-uri 'none'",
      "frame-ancestors 'none'",
      "form-action 'self'",
    ]) {
      expect(policy).toContain(rule);
    }
    expect(policy).not.toMatch(/script-src[^;]*unsafe-inline|style-src [^;]*unsafe-inline/);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('referrer-policy')).toBe('same-origin');
    expect(headers.get('x-powered-by')).toBeNull();
  });

  it('does not take its nonce from the request', async () => {
    const headers = { 'x-nonce': 'known', 'content-security-policy': "script-src 'nonce-known'" };
    const answer = await new Visitor().get('/', headers);
    expect(answer.headers.get('content-security-policy')).not.toContain('known');
    expect(answer.text).not.toContain('nonce="known"');
  });
});

describe('an address that cannot be read', () => {
  it.each(['/api/notebooks/%E0%A4%A', '/client/%', '/notebooks/%FF', '/api/client/%ZZ/export'])(
    '%s is said to be one, in a sentence',
    async (path) => {
      const answer = await new Visitor().get(path);
      expect([answer.status, answer.json.code]).toEqual([400, 'unreadable']);
    },
  );

  it('is not every one with a percent sign', async () => {
    const answer = await new Visitor().get('/api/notebooks/%41');
    expect([answer.status, answer.json.code]).toEqual([401, 'sign-in-needed']);
  });
});

describe('a client’s page', () => {
  it('is kept out of search engines, and not found for an unknown link', async () => {
    const answer = await new Visitor().get(`/client/${'A'.repeat(43)}`);
    expect(answer.headers.get('x-robots-tag')).toBe('noindex, nofollow');
    expect(answer.status).toBe(404);
  });
});
