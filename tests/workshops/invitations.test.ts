import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUserByEmail } from '@/db/queries/users';
import { addPerson, listPeople, readNotebook } from '@/lib/notebooks';
import { Letter } from '@/lib/mail/letter';
import {
  acceptInvitation,
  acceptWithNewAccount,
  invite,
  listInvitations,
  listMembers,
  lookAtInvitation,
  readWorkshop,
  resendInvitation,
  shareNotebook,
  withdrawInvitation,
} from '@/lib/workshops';
import { deedsIn, lettersTo, newNotebook, newPerson, newYard, tokenFor } from './yard';

afterAll(closeDatabase);

const password = 'trammel and straightedge';
const code = (wanted: string) => ({ code: wanted });
const freshEmail = () => `new.${randomUUID()}@quarrymoor.example`;
const expireNow = (id: string) =>
  database()('invitations')
    .where({ id })
    .update({ expires_at: new Date(Date.now() - 1000) });

describe('an invitation to a workshop', () => {
  it('goes out as one letter that says who, to what, as what, and until when', async () => {
    const yard = await newYard();
    const email = freshEmail();
    const made = await invite(yard.admin, { workshop: yard.id }, { email, role: 'admin' });
    const letters = await lettersTo(email);
    expect(letters).toHaveLength(1);
    const letter = Letter.parse(letters[0]);
    expect(letter.subject).toBe('Ada invites you to “Quarrymoor Yard”');
    expect(letter.paragraphs.join(' ')).toContain('as an admin');
    expect(letter.paragraphs.join(' ')).toContain(made.expiresAt.slice(0, 10));
    expect(letter.reason).toContain('Ada');
    expect(new URL(letter.action?.url ?? '').pathname).toMatch(/^\/invitations\/[\w-]{43}$/);
  });

  it('keeps no token, only its hash', async () => {
    const yard = await newYard();
    const email = freshEmail();
    const { id } = await invite(yard.admin, { workshop: yard.id }, { email, role: 'member' });
    const row: unknown = await database()('invitations').where({ id }).first();
    expect(JSON.stringify(row)).not.toContain(await tokenFor(email));
  });

  it('makes the invited person a member, once', async () => {
    const yard = await newYard();
    await invite(yard.admin, { workshop: yard.id }, { email: yard.stranger.email, role: 'member' });
    const token = await tokenFor(yard.stranger.email);
    expect(await lookAtInvitation(token)).toMatchObject({
      state: 'open',
      workshop: { name: 'Quarrymoor Yard' },
      notebook: null,
      role: 'member',
      invitedBy: 'Ada',
      hasAccount: true,
    });
    expect(await acceptInvitation(yard.stranger, token)).toEqual({
      path: `/workshops/${yard.id}`,
    });
    expect((await readWorkshop(yard.stranger, yard.id)).role).toBe('member');
    expect(await lookAtInvitation(token)).toMatchObject({ state: 'accepted' });
    await expect(acceptInvitation(yard.stranger, token)).rejects.toMatchObject(code('link-over'));
    expect(await listInvitations(yard.admin, { workshop: yard.id })).toEqual([]);
    expect(await deedsIn(yard.id)).toEqual(['member.invited', 'member.joined']);
  });

  it('is accepted once, however many try at once', async () => {
    const yard = await newYard();
    await invite(yard.admin, { workshop: yard.id }, { email: yard.stranger.email, role: 'member' });
    const token = await tokenFor(yard.stranger.email);
    const tries = await Promise.allSettled(
      Array.from({ length: 5 }, () => acceptInvitation(yard.stranger, token)),
    );
    expect(tries.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await deedsIn(yard.id)).toEqual(['member.invited', 'member.joined']);
  });

  it('is for its address alone', async () => {
    const yard = await newYard();
    const other = await newPerson('Otto');
    await invite(yard.admin, { workshop: yard.id }, { email: yard.stranger.email, role: 'member' });
    const token = await tokenFor(yard.stranger.email);
    await expect(acceptInvitation(other, token)).rejects.toMatchObject(code('other-address'));
    await expect(readWorkshop(other, yard.id)).rejects.toMatchObject(code('not-found'));
  });

  it('never takes a higher role away from whoever got one meanwhile', async () => {
    const yard = await newYard();
    await invite(yard.admin, { workshop: yard.id }, { email: yard.stranger.email, role: 'member' });
    const token = await tokenFor(yard.stranger.email);
    await database()('memberships').insert({
      workshop_id: yard.id,
      user_id: yard.stranger.id,
      role: 'admin',
    });
    await acceptInvitation(yard.stranger, token);
    expect((await readWorkshop(yard.stranger, yard.id)).role).toBe('admin');
  });

  it('is sent by admins alone, and outsiders learn nothing of the workshop', async () => {
    const yard = await newYard();
    const asked = { email: freshEmail(), role: 'member' } as const;
    const target = { workshop: yard.id };
    await expect(invite(yard.member, target, asked)).rejects.toMatchObject(code('forbidden'));
    await expect(invite(yard.stranger, target, asked)).rejects.toMatchObject(code('not-found'));
    await expect(listInvitations(yard.member, target)).rejects.toMatchObject(code('forbidden'));
    expect(await lettersTo(asked.email)).toEqual([]);
  });

  it('is refused for a member, and for an address that waits already', async () => {
    const yard = await newYard();
    const target = { workshop: yard.id };
    const again = { email: freshEmail(), role: 'member' } as const;
    await invite(yard.admin, target, again);
    await expect(invite(yard.admin, target, again)).rejects.toMatchObject(code('already-added'));
    await expect(
      invite(yard.admin, target, { email: yard.member.email, role: 'admin' }),
    ).rejects.toMatchObject(code('already-added'));
    expect(await lettersTo(again.email)).toHaveLength(1);
  });
});

describe('an invitation that does not hold any more', () => {
  it('says that it was withdrawn', async () => {
    const yard = await newYard();
    const target = { workshop: yard.id };
    const { id } = await invite(yard.admin, target, { email: yard.stranger.email, role: 'member' });
    const token = await tokenFor(yard.stranger.email);
    await withdrawInvitation(yard.admin, target, id);
    expect(await lookAtInvitation(token)).toMatchObject({ state: 'withdrawn' });
    await expect(acceptInvitation(yard.stranger, token)).rejects.toMatchObject(code('link-over'));
    await expect(withdrawInvitation(yard.admin, target, id)).rejects.toMatchObject(
      code('not-found'),
    );
    expect(await deedsIn(yard.id)).toEqual(['member.invited', 'invitation.withdrawn']);
  });

  it('says that it expired, and holds again when it is sent again, under a new link only', async () => {
    const yard = await newYard();
    const target = { workshop: yard.id };
    const { id } = await invite(yard.admin, target, { email: yard.stranger.email, role: 'member' });
    const first = await tokenFor(yard.stranger.email);
    await expireNow(id);
    expect(await lookAtInvitation(first)).toMatchObject({ state: 'expired' });
    await expect(acceptInvitation(yard.stranger, first)).rejects.toMatchObject(code('link-over'));
    expect(await listInvitations(yard.admin, target)).toMatchObject([{ id, expired: true }]);
    await resendInvitation(yard.admin, target, id);
    await expect(lookAtInvitation(first)).rejects.toMatchObject(code('not-found'));
    await acceptInvitation(yard.stranger, await tokenFor(yard.stranger.email));
    expect((await readWorkshop(yard.stranger, yard.id)).role).toBe('member');
  });

  it('is sent five times at most', async () => {
    const yard = await newYard();
    const target = { workshop: yard.id };
    const email = freshEmail();
    const { id } = await invite(yard.admin, target, { email, role: 'member' });
    for (let letter = 2; letter <= 5; letter += 1) await resendInvitation(yard.admin, target, id);
    await expect(resendInvitation(yard.admin, target, id)).rejects.toMatchObject(
      code('limit-reached'),
    );
    expect(await lettersTo(email)).toHaveLength(5);
  });

  it('is nothing where the token is unknown', async () => {
    for (const token of ['', 'x', 'A'.repeat(43), '../../etc']) {
      await expect(lookAtInvitation(token)).rejects.toMatchObject(code('not-found'));
    }
  });

  it('belongs to its place: it is neither sent nor withdrawn from another', async () => {
    const [yard, other] = [await newYard(), await newYard()];
    const notebook = await newNotebook(yard.admin, yard.id);
    const asked = { email: freshEmail(), role: 'member' } as const;
    const { id } = await invite(yard.admin, { workshop: yard.id }, asked);
    for (const [person, target] of [
      [other.admin, { workshop: other.id }],
      [yard.admin, { notebook }],
    ] as const) {
      await expect(withdrawInvitation(person, target, id)).rejects.toMatchObject(code('not-found'));
      await expect(resendInvitation(person, target, id)).rejects.toMatchObject(code('not-found'));
    }
  });
});

describe('an invitation to one notebook', () => {
  it('gives just the role: no membership of the workshop', async () => {
    const yard = await newYard();
    const notebook = await newNotebook(yard.member, yard.id);
    const email = freshEmail();
    const shared = await shareNotebook(yard.member, notebook, { email, role: 'editor' });
    expect(shared).toMatchObject({ kind: 'invited', invitation: { email, role: 'editor' } });
    const token = await tokenFor(email);
    const joined = await acceptWithNewAccount(token, { name: 'Nell', password }, randomUUID());
    expect(joined).toEqual({ path: `/notebooks/${notebook}` });
    const user = await findUserByEmail(database(), email);
    const nell = { id: user?.id ?? '', name: 'Nell', email };
    expect((await readNotebook(nell, notebook)).notebook.role).toBe('editor');
    await expect(readWorkshop(nell, yard.id)).rejects.toMatchObject(code('not-found'));
    expect((await listMembers(yard.admin, yard.id)).map(({ name }) => name)).toEqual([
      'Ada',
      'Mab',
    ]);
  });

  it('goes to addresses without an account; who has one gets the role at once', async () => {
    const yard = await newYard();
    const notebook = await newNotebook(yard.member, yard.id);
    const { email } = yard.stranger;
    const shared = await shareNotebook(yard.member, notebook, { email, role: 'viewer' });
    expect(shared).toMatchObject({ kind: 'added', person: { role: 'viewer' } });
    expect(await lettersTo(email)).toEqual([]);
    expect(await listInvitations(yard.member, { notebook })).toEqual([]);
  });

  it('is sent by owners alone, not by admins of the workshop', async () => {
    const yard = await newYard();
    const notebook = await newNotebook(yard.member, yard.id);
    await addPerson(yard.member, notebook, { email: yard.stranger.email, role: 'editor' });
    const asked = { email: freshEmail(), role: 'viewer' } as const;
    await expect(shareNotebook(yard.admin, notebook, asked)).rejects.toMatchObject(
      code('not-found'),
    );
    await expect(shareNotebook(yard.stranger, notebook, asked)).rejects.toMatchObject(
      code('forbidden'),
    );
    await expect(listInvitations(yard.stranger, { notebook })).rejects.toMatchObject(
      code('forbidden'),
    );
    expect(await listPeople(yard.member, notebook)).toHaveLength(2);
  });

  it('ends with its notebook', async () => {
    const yard = await newYard();
    const notebook = await newNotebook(yard.member, yard.id);
    const email = freshEmail();
    await shareNotebook(yard.member, notebook, { email, role: 'viewer' });
    await database()('notebooks').where({ id: notebook }).delete();
    await expect(lookAtInvitation(await tokenFor(email))).rejects.toMatchObject(code('not-found'));
  });
});

describe('making an account by an invitation', () => {
  it('makes account and membership together, or neither', async () => {
    const yard = await newYard();
    const email = freshEmail();
    const target = { workshop: yard.id };
    const { id } = await invite(yard.admin, target, { email, role: 'member' });
    const token = await tokenFor(email);
    await withdrawInvitation(yard.admin, target, id);
    const account = { name: 'Nell', password };
    await expect(acceptWithNewAccount(token, account, randomUUID())).rejects.toMatchObject(
      code('link-over'),
    );
    expect(await findUserByEmail(database(), email)).toBeNull();
  });

  it('is refused where the address has an account: its password is not known', async () => {
    const yard = await newYard();
    await invite(yard.admin, { workshop: yard.id }, { email: yard.stranger.email, role: 'admin' });
    const token = await tokenFor(yard.stranger.email);
    const account = { name: 'Nell', password };
    await expect(acceptWithNewAccount(token, account, randomUUID())).rejects.toMatchObject(
      code('already-added'),
    );
    expect(await lookAtInvitation(token)).toMatchObject({ state: 'open' });
  });
});
