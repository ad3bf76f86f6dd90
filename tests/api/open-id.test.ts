import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { letterTo } from '../setup/letters';
import { openDatabase } from '../setup/server';
import { openProvider, passThrough, type Vouched } from './support/provider';
import { PASSWORD, Visitor, freshEmail, newcomer, signUpAndRead } from './support/visitor';

const db = openDatabase();
const people = new Map<string, Vouched>();
let provider: { close(): void };

beforeAll(async () => {
  provider = await openProvider(people);
});
afterAll(async () => {
  provider.close();
  await db.destroy();
});

/** A subject at the provider with these claims. */
function vouchedFor(claims: Vouched): string {
  const subject = randomUUID();
  people.set(subject, claims);
  return subject;
}

/** Where the sign-in page's button leads. */
async function begin(visitor: Visitor): Promise<string> {
  const { json } = await visitor.get('/api/auth/csrf');
  const form = new URLSearchParams({
    csrfToken: String(json.csrfToken),
    callbackUrl: '/notebooks',
    json: 'true',
  });
  const answer = await visitor.ask('POST', '/api/auth/signin/oidc', {
    body: form.toString(),
    headers: { 'content-type': 'application/x-www-form-urlencoded' },
  });
  return String(answer.json.url);
}

/** Signs in through the provider; gives the address the visitor ends at. */
async function signInThrough(visitor: Visitor, subject: string): Promise<URL> {
  const back = await passThrough(await begin(visitor), subject);
  const answer = await visitor.get(back.pathname + back.search);
  const led = new URL(answer.headers.get('location') ?? '/', back);
  if (!led.pathname.startsWith('/api/auth/error')) return led;
  const told = await visitor.get(led.pathname + led.search);
  return new URL(told.headers.get('location') ?? '/', back);
}

const accountsOf = (email: string) =>
  db('users').where({ email }).select('id', 'name', 'password_hash') as unknown as Promise<
    { id: string; name: string; password_hash: string }[]
  >;

describe('signing in through another service', () => {
  it('is offered on the page, and asks with state, nonce and a code challenge', async () => {
    const visitor = new Visitor();
    expect((await visitor.get('/sign-in')).text).toContain('Quarry House');
    const { searchParams } = new URL(await begin(visitor));
    expect(searchParams.get('scope')).toBe('openid email profile');
    expect(searchParams.get('code_challenge_method')).toBe('S256');
    for (const name of ['state', 'nonce', 'code_challenge']) {
      expect(searchParams.get(name)?.length).toBeGreaterThan(20);
    }
  });

  it('makes somebody new an account with a workshop of their own, once', async () => {
    const email = freshEmail('orla');
    const subject = vouchedFor({ email, email_verified: true, name: 'Orla Finch' });
    const visitor = new Visitor();
    expect((await signInThrough(visitor, subject)).pathname).toBe('/notebooks');
    expect((await visitor.get('/api/auth/session')).json.user).toEqual({
      name: 'Orla Finch',
      email,
    });
    expect((await visitor.post('/api/notebooks', { title: 'First' })).status).toBe(201);
    const again = new Visitor();
    await signInThrough(again, subject);
    expect((await again.get('/api/notebooks')).json.notebooks).toMatchObject([
      { title: 'First', workshop: { name: 'Workshop of Orla Finch' } },
    ]);
    expect(await accountsOf(email)).toMatchObject([{ name: 'Orla Finch', password_hash: '' }]);
    const settings = await again.get('/settings');
    expect(settings.text).toContain('through another service');
  });

  it('opens the account that has the verified address, and tells its owner', async () => {
    const known = await newcomer('Maren');
    const subject = vouchedFor({ email: known.email.toUpperCase(), email_verified: true });
    const visitor = new Visitor();
    await signInThrough(visitor, subject);
    expect((await visitor.get('/api/auth/session')).json.user).toMatchObject({ name: 'Maren' });
    expect(await accountsOf(known.email)).toHaveLength(1);
    await letterTo(known.email, { subject: 'Quarry House now opens your account' });
    expect((await new Visitor().signIn(known.email)).status).toBe(200);
  });

  it('knows the person by issuer and subject, whatever the address becomes there', async () => {
    const first = freshEmail('orla');
    const subject = vouchedFor({ email: first, email_verified: true, name: 'Orla' });
    await signInThrough(new Visitor(), subject);
    const other = await newcomer('Maren');
    people.set(subject, { email: other.email, email_verified: true, name: 'Orla' });
    const visitor = new Visitor();
    await signInThrough(visitor, subject);
    expect((await visitor.get('/api/auth/session')).json.user).toEqual({
      name: 'Orla',
      email: first,
    });
  });

  it.each([
    ['not verified', { email_verified: false }],
    ['not said to be verified', {}],
    ['verified by the word “true”', { email_verified: 'true' as never }],
  ])('opens nothing for an address that is %s', async (_, claims) => {
    const known = await newcomer('Maren');
    const subject = vouchedFor({ email: known.email, ...claims });
    const visitor = new Visitor();
    const led = await signInThrough(visitor, subject);
    expect([led.pathname, led.searchParams.get('error')]).toEqual(['/sign-in', 'forbidden']);
    expect(visitor.session).toBeUndefined();
    const page = await visitor.get(led.pathname + led.search);
    expect(page.text).toContain('does not vouch for an e-mail address');
  });

  it('opens nothing for somebody without an address', async () => {
    const visitor = new Visitor();
    const led = await signInThrough(visitor, vouchedFor({ name: 'Nobody' }));
    expect(led.searchParams.get('error')).toBe('forbidden');
    expect(visitor.session).toBeUndefined();
  });

  it('hands nobody an account that a stranger prepared for the address', async () => {
    const stranger = new Visitor();
    stranger.email = freshEmail('orla');
    const token = await signUpAndRead(stranger, 'Impostor');
    const subject = vouchedFor({
      email: stranger.email,
      email_verified: true,
      name: 'Orla Finch',
    });
    await signInThrough(new Visitor(), subject);
    expect((await stranger.signIn(stranger.email, PASSWORD)).status).toBe(401);
    const late = await stranger.post('/api/accounts/confirm', { token });
    expect([late.status, late.json.code]).toEqual([410, 'link-over']);
    expect(await accountsOf(stranger.email)).toMatchObject([{ name: 'Orla Finch' }]);
  });

  it('takes no answer that was meant for another browser, or was altered', async () => {
    const subject = vouchedFor({ email: freshEmail('orla'), email_verified: true });
    const victim = new Visitor();
    await begin(victim);
    const back = await passThrough(await begin(new Visitor()), subject);
    const foreign = await victim.get(back.pathname + back.search);
    expect(foreign.headers.get('location')).toContain('error=');
    expect(victim.session).toBeUndefined();
    const visitor = new Visitor();
    const own = await passThrough(await begin(visitor), subject);
    own.searchParams.set('code', 'altered');
    expect((await visitor.get(own.pathname + own.search)).headers.get('location')).toContain(
      'error=',
    );
    expect(visitor.session).toBeUndefined();
  });
});
