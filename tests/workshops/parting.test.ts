import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { addPerson, handOver, leaveNotebook, listPeople, readNotebook } from '@/lib/notebooks';
import { newNotebook, newYard } from './yard';

afterAll(closeDatabase);

const code = (wanted: string) => ({ code: wanted });

async function newSharedNotebook() {
  const yard = await newYard();
  const id = await newNotebook(yard.admin, yard.id);
  await addPerson(yard.admin, id, { email: yard.member.email, role: 'viewer' });
  return { ...yard, id };
}

describe('leaving a notebook', () => {
  it('is open to everybody with a role, and ends the role', async () => {
    const { admin, member, id } = await newSharedNotebook();
    await leaveNotebook(member, id);
    await expect(readNotebook(member, id)).rejects.toMatchObject(code('not-found'));
    expect(await listPeople(admin, id)).toHaveLength(1);
  });

  it('is closed to the last owner, also when two owners leave at once', async () => {
    for (let round = 0; round < 6; round += 1) {
      const { admin, stranger, id } = await newSharedNotebook();
      await addPerson(admin, id, { email: stranger.email, role: 'owner' });
      const ends = await Promise.allSettled([
        leaveNotebook(admin, id),
        leaveNotebook(stranger, id),
      ]);
      expect(ends.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
      const refused = ends.find((end) => end.status === 'rejected');
      expect(refused?.reason).toMatchObject(code('last-owner'));
    }
  });

  it('says to outsiders what it says of an unknown notebook', async () => {
    const { stranger, id } = await newSharedNotebook();
    await expect(leaveNotebook(stranger, id)).rejects.toMatchObject(code('not-found'));
  });
});

describe('handing a notebook over', () => {
  it('makes the other an owner and oneself an editor, in one step', async () => {
    const { admin, member, id } = await newSharedNotebook();
    await handOver(admin, id, { to: member.id });
    const people = await listPeople(member, id);
    expect(people.map((one) => [one.id, one.role])).toEqual([
      [member.id, 'owner'],
      [admin.id, 'editor'],
    ]);
  });

  it('needs somebody else who has a role on it', async () => {
    const { admin, stranger, id } = await newSharedNotebook();
    await expect(handOver(admin, id, { to: stranger.id })).rejects.toMatchObject(code('not-found'));
    await expect(handOver(admin, id, { to: admin.id })).rejects.toMatchObject(code('invalid'));
    await expect(handOver(admin, id, { to: 'x' })).rejects.toMatchObject(code('not-found'));
  });

  it('is for owners', async () => {
    const { admin, member, id } = await newSharedNotebook();
    await expect(handOver(member, id, { to: admin.id })).rejects.toMatchObject(code('forbidden'));
  });
});
