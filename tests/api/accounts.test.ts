import { beforeAll, describe, expect, it } from 'vitest';
import { letterTo, linkIn } from '../setup/letters';
import { PASSWORD, Visitor, freshEmail, newcomer, tokenIn } from './support/visitor';

const account = (email: string) => ({
  name: 'Maren Oldacre',
  email,
  password: PASSWORD,
  workshop: 'Oldacre Joinery',
});

describe('signing up', () => {
  it('sends a letter whose link makes an account, its workshop and a way in', async () => {
    const visitor = new Visitor();
    visitor.email = freshEmail('maren');
    const { email } = visitor;
    const asked = await visitor.post('/api/accounts', account(email));
    expect([asked.status, asked.json]).toEqual([202, { email, confirmed: false }]);
    const letter = await letterTo(email, { subject: 'Confirm your e-mail address' });
    const page = await visitor.get(new URL(linkIn(letter.text)).pathname);
    expect(page.status).toBe(200);
    expect(page.headers.get('cache-control')).toContain('no-store');
    expect(page.headers.get('x-robots-tag')).toBe('noindex, nofollow');
    expect(page.text).toContain('Oldacre Joinery');
    const early = await visitor.signIn(email);
    expect(early.status).toBe(401);
    expect(String(early.json.url)).toContain('error=unconfirmed');
    const token = tokenIn(linkIn(letter.text));
    const made = await visitor.post('/api/accounts/confirm', { token });
    expect(made.status).toBe(201);
    expect(made.json).toEqual({ id: made.json.id, name: 'Maren Oldacre', email });
    expect(asked.text + made.text + letter.text).not.toContain(PASSWORD);
    expect((await visitor.signIn(email)).status).toBe(200);
    const notebook = await visitor.post('/api/notebooks', { title: 'First' });
    expect(notebook.status).toBe(201);
    const list = await visitor.get('/api/notebooks');
    expect(list.json.notebooks).toMatchObject([
      { title: 'First', workshop: { name: 'Oldacre Joinery' }, role: 'owner', version: 1 },
    ]);
    const again = await visitor.post('/api/accounts/confirm', { token });
    expect([again.status, again.json.code]).toEqual([410, 'link-over']);
    expect((await visitor.get(new URL(linkIn(letter.text)).pathname)).text).toContain('not valid');
  });

  it('answers alike for an address that has an account, whatever its case, and writes to its owner', async () => {
    const known = await newcomer('Maren');
    const [fresh, taken] = [freshEmail('maren'), known.email.toUpperCase()];
    const [first, second] = await Promise.all(
      [fresh, taken].map((email) => new Visitor().post('/api/accounts', account(email))),
    );
    expect([first?.status, second?.status]).toEqual([202, 202]);
    expect({ ...second?.json, email: '' }).toEqual({ ...first?.json, email: '' });
    const letter = await letterTo(known.email, { subject: 'You have an account already' });
    expect(letter.text).toContain('Sign in with the password you have');
  });

  it.each([
    ['name', { name: '   ' }],
    ['name', { name: 'x'.repeat(121) }],
    ['name', { name: 'two\nlines' }],
    ['email', { email: 'not an address' }],
    ['email', { email: `${'a'.repeat(250)}@example.org` }],
    ['password', { password: 'short' }],
    ['password', { password: 'x'.repeat(201) }],
    ['workshop', { workshop: 7 }],
  ])('names the field %s when it is not as expected: %j', async (field, wrong) => {
    const answer = await new Visitor().post('/api/accounts', {
      ...account(freshEmail('maren')),
      ...wrong,
    });
    expect(answer.status).toBe(422);
    expect(answer.json.code).toBe('invalid');
    expect(answer.json.fields).toMatchObject([{ field }]);
  });

  it('limits new accounts per address and says how long to wait', async () => {
    const visitor = new Visitor();
    const answers = await Promise.all(
      Array.from({ length: 34 }, () => visitor.post('/api/accounts', account(freshEmail('many')))),
    );
    const refused = answers.filter(({ status }) => status === 429);
    expect(refused.length).toBeGreaterThanOrEqual(1);
    expect(answers.filter(({ status }) => status === 202).length).toBeLessThanOrEqual(30);
    expect(refused[0]?.json.code).toBe('too-many');
    expect(Number(refused[0]?.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});

describe('signing in', () => {
  let email: string;
  beforeAll(async () => {
    email = (await newcomer('Maren')).email;
  });

  it('answers 401 alike for a wrong password and for an unknown address, without a session', async () => {
    const wrong = new Visitor();
    const unknown = new Visitor();
    const first = await wrong.signIn(email, 'not the password');
    const second = await unknown.signIn(freshEmail('ghost'), 'not the password');
    expect([first.status, second.status]).toEqual([401, 401]);
    expect(first.json).toEqual(second.json);
    expect(wrong.session).toBeUndefined();
    expect(unknown.session).toBeUndefined();
  });

  it('shuts an e-mail address after ten wrong passwords, for the right password too', async () => {
    const person = await newcomer('Locked');
    for (let attempt = 0; attempt < 10; attempt += 1) {
      const answer = await new Visitor().signIn(person.email, `guess number ${attempt}`);
      expect(String(answer.json.url)).toContain('error=CredentialsSignin');
    }
    const late = new Visitor();
    const answer = await late.signIn(person.email);
    expect(answer.status).toBe(401);
    expect(String(answer.json.url)).toContain('error=too-many');
    expect(late.session).toBeUndefined();
  });

  it('keeps the session cookie from scripts and from other sites', async () => {
    const visitor = new Visitor();
    const answer = await visitor.signIn(email);
    const cookie = answer.headers.getSetCookie().find((line) => line.includes('session-token'));
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
  });

  it('needs the token against forged forms', async () => {
    const visitor = new Visitor();
    await visitor.ask('POST', '/api/auth/callback/credentials', {
      body: new URLSearchParams({ email, password: PASSWORD, json: 'true' }).toString(),
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
    expect(visitor.session).toBeUndefined();
  });

  it('does not redirect to another host after signing in', async () => {
    const visitor = new Visitor();
    const { json } = await visitor.get('/api/auth/csrf');
    const answer = await visitor.ask('POST', '/api/auth/callback/credentials', {
      body: new URLSearchParams({
        csrfToken: String(json.csrfToken),
        email,
        password: PASSWORD,
        callbackUrl: 'https://elsewhere.example/',
        json: 'true',
      }).toString(),
      headers: { 'content-type': 'application/x-www-form-urlencoded', host: 'evil.example' },
    });
    expect(answer.status).toBe(200);
    expect(String(answer.json.url)).not.toContain('elsewhere');
    expect(String(answer.json.url)).not.toContain('evil');
  });

  it('refuses an over-long body before reading it', async () => {
    const answer = await new Visitor().ask('POST', '/api/auth/callback/credentials', {
      body: `email=${'x'.repeat(20_000)}`,
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
    expect(answer.status).toBe(413);
    expect(answer.json.code).toBe('too-large');
  });
});

describe('sessions', () => {
  it('end on all devices at once, for endpoints and for the session itself', async () => {
    const here = await newcomer('Maren');
    const there = new Visitor();
    await there.signIn(here.email);
    expect((await there.get('/api/notebooks')).status).toBe(200);
    expect((await here.ask('DELETE', '/api/sessions')).status).toBe(204);
    const after = await there.get('/api/notebooks');
    expect(after.status).toBe(401);
    expect(after.json.code).toBe('sign-in-needed');
    expect((await there.get('/api/auth/session')).json).toEqual({});
    expect(there.session).toBeUndefined();
  });

  it('end for this browser when signing out', async () => {
    const visitor = await newcomer('Maren');
    const { json } = await visitor.get('/api/auth/csrf');
    await visitor.ask('POST', '/api/auth/signout', {
      body: new URLSearchParams({ csrfToken: String(json.csrfToken), json: 'true' }).toString(),
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
    expect(visitor.session).toBeUndefined();
    expect((await visitor.get('/api/notebooks')).status).toBe(401);
  });

  it('are not made of a cookie that somebody altered', async () => {
    const visitor = await newcomer('Maren');
    const session = visitor.session ?? '';
    const middle = Math.floor(session.length / 2);
    const other = session[middle] === 'A' ? 'B' : 'A';
    visitor.cookies.set(
      'next-auth.session-token',
      session.slice(0, middle) + other + session.slice(middle + 1),
    );
    expect((await visitor.get('/api/notebooks')).status).toBe(401);
  });

  it('are not taken from a bearer token', async () => {
    const visitor = await newcomer('Maren');
    const authorization = `Bearer ${visitor.session}`;
    expect((await new Visitor().get('/api/notebooks', { authorization })).status).toBe(401);
  });
});
