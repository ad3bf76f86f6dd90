import { describe, expect, it } from 'vitest';
import { letterTo, lettersTo, linkIn } from '../setup/letters';
import { PASSWORD, Visitor, freshEmail, newcomer, tokenIn } from './support/visitor';

const NEW = 'a rod, a templet, a trammel';
const CHROME =
  'Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0.0.0 Safari/537.36';

interface Line {
  id: string;
  device: string;
  current: boolean;
}

const sessionsOf = async (visitor: Visitor) =>
  (await visitor.get('/api/sessions')).json.sessions as Line[];

describe('a forgotten password', () => {
  it('is replaced through the letter: page, new password, sign-in, and no second use', async () => {
    const person = await newcomer('Maren');
    const visitor = new Visitor();
    const asked = await visitor.post('/api/passwords/forgotten', { email: person.email });
    expect(asked.status).toBe(202);
    const letter = await letterTo(person.email, { subject: 'A new password' });
    expect(letter.html).toContain(linkIn(letter.text));
    const page = await visitor.get(new URL(linkIn(letter.text)).pathname);
    expect(page.text).toContain('Store the new password');
    expect(page.headers.get('cache-control')).toContain('no-store');
    expect(page.headers.get('referrer-policy')).toBe('same-origin');
    const token = tokenIn(linkIn(letter.text));
    const short = await visitor.post('/api/passwords/reset', { token, password: 'short' });
    expect([short.status, short.json.fields]).toMatchObject([422, [{ field: 'password' }]]);
    expect((await visitor.post('/api/passwords/reset', { token, password: NEW })).status).toBe(204);
    expect((await person.get('/api/notebooks')).status).toBe(401);
    expect((await visitor.signIn(person.email, NEW)).status).toBe(200);
    expect((await new Visitor().signIn(person.email)).status).toBe(401);
    const again = await visitor.post('/api/passwords/reset', { token, password: PASSWORD });
    expect([again.status, again.json.code]).toEqual([410, 'link-over']);
    await letterTo(person.email, { subject: 'Your password was changed' });
    expect((await visitor.get(new URL(linkIn(letter.text)).pathname)).text).toContain('not valid');
  });

  it('is answered alike, and in like time, for a known and an unknown address', async () => {
    const { email } = await newcomer('Maren');
    const unknown = freshEmail('ghost');
    const timed = async (address: string) => {
      const begin = performance.now();
      const answer = await new Visitor().post('/api/passwords/forgotten', { email: address });
      const { status, text } = answer;
      const names = [...answer.headers.keys()].sort();
      return { answer: { status, text, names }, took: performance.now() - begin };
    };
    const [known, other] = [await timed(email), await timed(unknown)];
    expect(other.answer).toEqual(known.answer);
    for (const { took } of [known, other]) expect(took).toBeGreaterThan(295);
    await letterTo(email, { subject: 'A new password' });
    expect(await lettersTo(unknown)).toEqual([]);
  });

  it('cannot be asked for without end', async () => {
    const email = freshEmail('ghost');
    const answers = [];
    for (let time = 0; time < 6; time += 1) {
      answers.push(await new Visitor().post('/api/passwords/forgotten', { email }));
    }
    expect(answers.map(({ status }) => status)).toEqual([202, 202, 202, 202, 202, 429]);
    expect(Number(answers[5]?.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});

describe('the sessions of a person', () => {
  it('are listed with their device, and each is ended at once', async () => {
    const here = await newcomer('Maren');
    const there = new Visitor();
    there.userAgent = CHROME;
    await there.signIn(here.email);
    const lines = await sessionsOf(here);
    expect(lines).toHaveLength(2);
    expect(lines.filter(({ current }) => current)).toHaveLength(1);
    const other = lines.find(({ current }) => !current);
    expect(other?.device).toBe('Chrome on Linux');
    expect((await here.get('/settings')).text).toContain('Chrome on Linux');
    expect((await here.ask('DELETE', `/api/sessions/${other?.id}`)).status).toBe(204);
    expect((await there.get('/api/notebooks')).status).toBe(401);
    expect(await sessionsOf(here)).toHaveLength(1);
    expect((await here.ask('DELETE', `/api/sessions/${other?.id}`)).status).toBe(404);
  });

  it('are nobody else’s to end', async () => {
    const [one, two] = [await newcomer('Maren'), await newcomer('Orla')];
    const [line] = await sessionsOf(one);
    expect((await two.ask('DELETE', `/api/sessions/${line?.id}`)).status).toBe(404);
    expect((await one.get('/api/notebooks')).status).toBe(200);
  });

  it('lose the one that signs out', async () => {
    const here = await newcomer('Maren');
    const there = new Visitor();
    await there.signIn(here.email);
    const { json } = await there.get('/api/auth/csrf');
    await there.ask('POST', '/api/auth/signout', {
      body: new URLSearchParams({ csrfToken: String(json.csrfToken), json: 'true' }).toString(),
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
    expect(await sessionsOf(here)).toHaveLength(1);
  });
});

describe('the account', () => {
  it('is renamed, and the name is new in the session that goes on', async () => {
    const person = await newcomer('Maren');
    const renamed = await person.ask('PATCH', '/api/account', { body: { name: ' Orla Finch ' } });
    expect(renamed.status).toBe(204);
    expect((await person.get('/api/auth/session')).json.user).toMatchObject({ name: 'Orla Finch' });
    const empty = await person.ask('PATCH', '/api/account', { body: { name: ' ' } });
    expect([empty.status, empty.json.fields]).toMatchObject([422, [{ field: 'name' }]]);
  });

  it('gets a new password from whoever knows the old one; other sessions end, this one stays', async () => {
    const here = await newcomer('Maren');
    const there = new Visitor();
    await there.signIn(here.email);
    const wrong = await here.post('/api/account/password', { current: 'no', password: NEW });
    expect([wrong.status, wrong.json.fields]).toMatchObject([422, [{ field: 'current' }]]);
    const body = { current: PASSWORD, password: NEW };
    expect((await here.post('/api/account/password', body)).status).toBe(204);
    expect((await here.get('/api/notebooks')).status).toBe(200);
    expect((await there.get('/api/notebooks')).status).toBe(401);
    const letter = await letterTo(here.email, { subject: 'Your password was changed' });
    expect(new URL(linkIn(letter.text)).pathname).toBe('/forgot');
  });

  it('is exported as a file', async () => {
    const person = await newcomer('Maren');
    const answer = await person.get('/api/account/export');
    expect(answer.headers.get('content-disposition')).toMatch(/^attachment; .*\.json/);
    expect(answer.json).toMatchObject({ format: 1, account: { email: person.email } });
  });

  it('is deleted with the password, and its session with it', async () => {
    const person = await newcomer('Maren');
    const wrong = await person.ask('DELETE', '/api/account', { body: { password: 'no' } });
    expect([wrong.status, wrong.json.code]).toEqual([422, 'invalid']);
    const gone = await person.ask('DELETE', '/api/account', { body: { password: PASSWORD } });
    expect(gone.status).toBe(204);
    expect((await person.get('/api/notebooks')).status).toBe(401);
    expect((await new Visitor().signIn(person.email)).status).toBe(401);
    await letterTo(person.email, { subject: 'Your account was deleted' });
  });

  it.each([
    ['GET', '/api/account/export', undefined],
    ['GET', '/api/sessions', undefined],
    ['DELETE', '/api/sessions/00000000-0000-4000-8000-000000000000', undefined],
    ['PATCH', '/api/account', { name: 'Maren' }],
    ['DELETE', '/api/account', { password: PASSWORD }],
    ['POST', '/api/account/password', { current: PASSWORD, password: NEW }],
  ])('needs a person for %s %s, on a page of this site', async (method, path, body) => {
    const nobody = await new Visitor().ask(method, path, { body });
    expect([nobody.status, nobody.json.code]).toEqual([401, 'sign-in-needed']);
    if (method === 'GET') return;
    const person = await newcomer('Maren');
    const headers = { origin: 'https://elsewhere.example' };
    const foreign = await person.ask(method, path, { body, headers });
    expect([foreign.status, foreign.json.code]).toEqual([403, 'foreign-origin']);
  });
});

describe('the letters of a copy without an SMTP server', () => {
  it('are read by admins of its first workshop, and are not there for anybody else', async () => {
    const waiting = new Visitor();
    const email = freshEmail('waiting');
    await waiting.post('/api/accounts', {
      name: 'Waiting',
      email,
      password: PASSWORD,
      workshop: 'Waiting Yard',
    });
    const letter = await letterTo(email);
    const link = linkIn(letter.text);

    const ida = new Visitor();
    await ida.signIn('ida@ferrowick.example', 'limestone-and-lime');
    const list = await ida.get('/mail');
    expect(list.status).toBe(200);
    const path = new RegExp(`href="(/mail/[^"]+)"(?:(?!</tr>).)*${email}`, 's').exec(
      list.text,
    )?.[1];
    const page = await ida.get(path ?? 'missing');
    expect(page.text).toContain(`href="${link}"`);
    expect(page.text).toMatch(/<iframe[^>]*sandbox="allow-popups allow-popups-to-escape-sandbox"/);
    expect((await ida.get('/mail/..%2Fstate')).status).toBe(404);

    const tam = new Visitor();
    await tam.signIn('tam@ferrowick.example', 'limestone-and-lime');
    const stranger = await newcomer('Strand');
    for (const visitor of [tam, stranger]) {
      for (const place of ['/mail', path ?? 'missing']) {
        const answer = await visitor.get(place);
        expect(answer.status).toBe(404);
        expect(answer.text).not.toContain(tokenIn(link));
      }
    }
    expect((await new Visitor().get('/mail')).status).toBe(307);
  });
});
