import { describe, expect, it } from 'vitest';
import { letterTo, linkIn } from '../setup/letters';
import { newNotebook } from './support/notebook';
import { PASSWORD, Visitor, freshEmail, newcomer, tokenIn } from './support/visitor';

const SUBJECT = 'invites you to';

/** The link in the newest letter of invitation to an address, as it was sent. */
async function linkFor(email: string, count = 1): Promise<string> {
  const letter = await letterTo(email, { subject: SUBJECT, count });
  expect(String(letter.html)).toContain(linkIn(letter.text));
  return linkIn(letter.text);
}

describe('an invitation to one notebook', () => {
  it('leads from the letter to an account and to the notebook', async () => {
    const owner = await newcomer('Owain');
    const notebook = await newNotebook(owner, 'R = 1200 mm');
    const email = freshEmail('nell');
    const shared = await owner.post(`/api/notebooks/${notebook}/people`, { email, role: 'editor' });
    expect(shared.status).toBe(202);
    expect(shared.json.invitation).toMatchObject({ email, role: 'editor', invitedBy: 'Owain' });
    expect(shared.text).not.toMatch(/token|hash/i);

    const link = await linkFor(email);
    const nell = new Visitor();
    const page = await nell.get(new URL(link).pathname);
    expect(page.status).toBe(200);
    for (const told of ['Owain', 'Rose window 1', email, 'an editor']) {
      expect(page.text).toContain(told);
    }
    expect(page.headers.get('x-robots-tag')).toBe('noindex, nofollow');
    expect(page.headers.get('cache-control')).toContain('no-store');

    const token = tokenIn(link);
    const account = { name: 'Nell', password: PASSWORD };
    const made = await nell.post(`/api/invitations/${token}/account`, account);
    expect([made.status, made.json.path]).toEqual([201, `/notebooks/${notebook}`]);
    await nell.signIn(email);
    const opened = await nell.get(`/api/notebooks/${notebook}`);
    expect(opened.json.notebook).toMatchObject({ role: 'editor' });
    expect((await nell.get('/api/workshops')).json.workshops).toEqual([]);

    const again = await new Visitor().post(`/api/invitations/${token}/account`, account);
    expect([again.status, again.json.code]).toEqual([410, 'link-over']);
  });
});

describe('an invitation to a workshop', () => {
  it('is accepted by the invited person, signed in, and by nobody else', async () => {
    const [admin, invited, other] = await Promise.all([
      newcomer('Ada'),
      newcomer('Una'),
      newcomer('Otto'),
    ]);
    const { json } = await admin.get('/api/workshops');
    const [{ id } = { id: '' }] = json.workshops as { id: string }[];
    const asked = { email: invited.email, role: 'member' };
    const sent = await admin.post(`/api/workshops/${id}/invitations`, asked);
    expect(sent.status).toBe(201);
    const link = await linkFor(invited.email);
    const path = `/api/invitations/${tokenIn(link)}`;

    const nobody = await new Visitor().post(path, undefined);
    expect([nobody.status, nobody.json.code]).toEqual([401, 'sign-in-needed']);
    const wrong = await other.post(path, undefined);
    expect([wrong.status, wrong.json.code]).toEqual([403, 'other-address']);
    const page = await other.get(new URL(link).pathname);
    expect(page.text).toContain('This invitation is for another address.');

    const accepted = await invited.post(path, undefined);
    expect([accepted.status, accepted.json.path]).toEqual([200, `/workshops/${id}`]);
    expect((await invited.get(`/api/workshops/${id}`)).status).toBe(200);
  });

  it('that is sent again leaves the first link worth nothing, and withdrawn says so', async () => {
    const admin = await newcomer('Ada');
    const { json } = await admin.get('/api/workshops');
    const [{ id } = { id: '' }] = json.workshops as { id: string }[];
    const email = freshEmail('nell');
    const path = `/api/workshops/${id}/invitations`;
    const { json: made } = await admin.post(path, { email, role: 'admin' });
    const first = new URL(await linkFor(email)).pathname;
    const sent = await admin.post(`${path}/${String(made.id)}/letters`, undefined);
    expect(sent.status).toBe(204);
    const second = new URL(await linkFor(email, 2)).pathname;
    expect(second).not.toBe(first);
    expect((await new Visitor().get(first)).status).toBe(404);
    expect((await new Visitor().get(second)).status).toBe(200);
    await admin.ask('DELETE', `${path}/${String(made.id)}`);
    const over = await new Visitor().get(second);
    expect(over.text).toContain('This invitation has been withdrawn.');
  });
});

describe('a logo', () => {
  const PIXEL = Buffer.from(
    'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mP8/5+hHgAHggJ/PchI7wAAAABJRU5ErkJggg==',
    'base64',
  );

  it('is served as a file that runs nothing and may be kept, under the hash of its bytes', async () => {
    const admin = await newcomer('Ada');
    const { json } = await admin.get('/api/workshops');
    const [{ id } = { id: '' }] = json.workshops as { id: string }[];
    const path = `/api/workshops/${id}/logo`;
    const headers = { 'content-type': 'image/png' };
    const put = await admin.ask('PUT', path, { body: PIXEL, headers });
    expect(put.status).toBe(200);
    const { hash } = put.json.logo as { hash: string };
    const got = await admin.get(`${path}/${hash}`);
    expect(got.status).toBe(200);
    expect(Object.fromEntries(got.headers)).toMatchObject({
      'content-type': 'image/png',
      'content-disposition': 'attachment; filename="logo.png"',
      'content-security-policy': expect.stringContaining('sandbox') as string,
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, max-age=31536000, immutable',
      etag: `"${hash}"`,
    });
    const kept = await admin.get(`${path}/${hash}`, { 'if-none-match': `"${hash}"` });
    expect([kept.status, kept.text]).toEqual([304, '']);
    const large = await admin.ask('PUT', path, { body: Buffer.alloc(256 * 1024 + 1), headers });
    expect([large.status, large.json.code]).toEqual([413, 'too-large']);
  });
});
