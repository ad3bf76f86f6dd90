import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { addPerson, createNotebook, listPeople, readNotebook } from '@/lib/notebooks';
import {
  changeMember,
  leaveWorkshop,
  listMembers,
  readWorkshop,
  removeMember,
} from '@/lib/workshops';
import { deedsIn, newNotebook, newYard } from './yard';

afterAll(closeDatabase);

const code = (wanted: string) => ({ code: wanted });
const roleIn = async (person: Person, id: string) => (await readNotebook(person, id)).notebook.role;

describe('the people of a workshop', () => {
  it('are listed for members, admins first', async () => {
    const yard = await newYard();
    const members = await listMembers(yard.member, yard.id);
    expect(members.map(({ name, role }) => [name, role])).toEqual([
      ['Ada', 'admin'],
      ['Mab', 'member'],
    ]);
    await expect(listMembers(yard.stranger, yard.id)).rejects.toMatchObject(code('not-found'));
  });

  it('become admins and members again, by admins alone', async () => {
    const yard = await newYard();
    await expect(
      changeMember(yard.member, yard.id, yard.member.id, { role: 'admin' }),
    ).rejects.toMatchObject(code('forbidden'));
    await changeMember(yard.admin, yard.id, yard.member.id, { role: 'admin' });
    await changeMember(yard.member, yard.id, yard.admin.id, { role: 'member' });
    expect((await readWorkshop(yard.admin, yard.id)).role).toBe('member');
    expect(await deedsIn(yard.id)).toEqual(['member.role-changed', 'member.role-changed']);
  });

  it('that stay what they are leave no line on the record', async () => {
    const yard = await newYard();
    await changeMember(yard.admin, yard.id, yard.member.id, { role: 'member' });
    expect(await deedsIn(yard.id)).toEqual([]);
  });
});

describe('the last admin', () => {
  it('can neither become a member, nor leave, nor be removed', async () => {
    const yard = await newYard();
    const { admin, id } = yard;
    for (const attempt of [
      () => changeMember(admin, id, admin.id, { role: 'member' }),
      () => removeMember(admin, id, admin.id),
      () => leaveWorkshop(admin, id),
    ]) {
      await expect(attempt()).rejects.toMatchObject(code('last-admin'));
    }
    expect((await readWorkshop(admin, id)).role).toBe('admin');
  });

  it('is one of two at least who leave at the same moment', async () => {
    for (let round = 0; round < 8; round += 1) {
      const yard = await newYard();
      await changeMember(yard.admin, yard.id, yard.member.id, { role: 'admin' });
      const ends = await Promise.allSettled([
        leaveWorkshop(yard.admin, yard.id),
        round % 2 === 0
          ? leaveWorkshop(yard.member, yard.id)
          : removeMember(yard.admin, yard.id, yard.member.id),
      ]);
      expect(ends.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    }
  });

  it('stays when two admins demote each other at the same moment', async () => {
    for (let round = 0; round < 8; round += 1) {
      const yard = await newYard();
      const { admin, member, id } = yard;
      await changeMember(admin, id, member.id, { role: 'admin' });
      await Promise.allSettled([
        changeMember(admin, id, member.id, { role: 'member' }),
        changeMember(member, id, admin.id, { role: 'member' }),
      ]);
      const admins = (await listMembers(admin, id)).filter(({ role }) => role === 'admin');
      expect(admins).toHaveLength(1);
    }
  });
});

describe('whoever goes', () => {
  it('loses their roles on the notebooks of this workshop, and of no other', async () => {
    const yard = await newYard();
    const other = await newYard();
    const here = await newNotebook(yard.admin, yard.id);
    const there = await newNotebook(other.admin, other.id);
    await addPerson(yard.admin, here, { email: yard.member.email, role: 'editor' });
    await addPerson(other.admin, there, { email: yard.member.email, role: 'viewer' });
    await removeMember(yard.admin, yard.id, yard.member.id);
    await expect(readNotebook(yard.member, here)).rejects.toMatchObject(code('not-found'));
    await expect(readWorkshop(yard.member, yard.id)).rejects.toMatchObject(code('not-found'));
    expect(await roleIn(yard.member, there)).toBe('viewer');
  });

  it('names a successor for what only they own, and nothing happens until then', async () => {
    const yard = await newYard();
    const alone = await newNotebook(yard.member, yard.id, 'Alone');
    const shared = await newNotebook(yard.member, yard.id, 'Shared');
    await addPerson(yard.member, shared, { email: yard.stranger.email, role: 'owner' });
    const refused: unknown = await leaveWorkshop(yard.member, yard.id).catch((e: unknown) => e);
    expect(refused).toBeInstanceOf(Failure);
    expect(refused).toMatchObject({
      code: 'successor-needed',
      extra: { notebooks: [{ id: alone, title: 'Alone' }] },
    });
    expect(await roleIn(yard.member, alone)).toBe('owner');
    for (const successor of [yard.stranger.id, yard.member.id, 'nobody']) {
      await expect(leaveWorkshop(yard.member, yard.id, { successor })).rejects.toMatchObject(
        code('invalid'),
      );
    }
    await leaveWorkshop(yard.member, yard.id, { successor: yard.admin.id });
    expect(await roleIn(yard.admin, alone)).toBe('owner');
    expect((await listPeople(yard.admin, alone)).map(({ id }) => id)).toEqual([yard.admin.id]);
    expect((await listPeople(yard.stranger, shared)).map(({ id }) => id)).toEqual([
      yard.stranger.id,
    ]);
    const deeds = await deedsIn(yard.id);
    expect(deeds.filter((deed) => deed === 'role.handed-over')).toHaveLength(1);
    expect(deeds.at(-1)).toBe('member.left');
  });

  it('never leaves a notebook without an owner, though one is made at the same moment', async () => {
    for (let round = 0; round < 6; round += 1) {
      const yard = await newYard();
      const [made, gone] = await Promise.allSettled([
        createNotebook(yard.member, { title: 'Late', workshopId: yard.id }),
        removeMember(yard.admin, yard.id, yard.member.id),
      ]);
      // Either the notebook came first and stands in the way, or nothing could be made any more.
      expect([made.status, gone.status].sort()).toEqual(['fulfilled', 'rejected']);
      if (gone.status === 'rejected') expect(gone.reason).toMatchObject(code('successor-needed'));
      else if (made.status === 'rejected') expect(made.reason).toMatchObject(code('not-found'));
    }
  });

  it('is removed by admins alone', async () => {
    const yard = await newYard();
    await expect(removeMember(yard.member, yard.id, yard.admin.id)).rejects.toMatchObject(
      code('forbidden'),
    );
    await expect(removeMember(yard.stranger, yard.id, yard.admin.id)).rejects.toMatchObject(
      code('not-found'),
    );
    await expect(removeMember(yard.admin, yard.id, yard.stranger.id)).rejects.toMatchObject(
      code('not-found'),
    );
  });
});
