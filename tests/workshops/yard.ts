import { randomUUID } from 'node:crypto';
import { database } from '@/db/client';
import { insertUser } from '@/db/queries/users';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';
import type { Person } from '@/lib/accounts';
import type { Letter } from '@/lib/mail';
import { createNotebook } from '@/lib/notebooks';

/** Somebody with an account and nothing else. */
export async function newPerson(name: string): Promise<Person> {
  const email = `${name.toLowerCase()}.${randomUUID()}@quarrymoor.example`;
  const id = await insertUser(database(), { email, name, passwordHash: 'none' });
  return { id, name, email };
}

export interface Yard {
  id: string;
  name: string;
  admin: Person;
  member: Person;
  stranger: Person;
}

/** A workshop of its own with an admin and a member, and somebody who does not belong to it. */
export async function newYard(): Promise<Yard> {
  const name = 'Quarrymoor Yard';
  const admin = await newPerson('Ada');
  const member = await newPerson('Mab');
  const stranger = await newPerson('Strand');
  const id = await insertWorkshop(database(), { name });
  await insertMembership(database(), id, admin.id, 'admin');
  await insertMembership(database(), id, member.id, 'member');
  return { id, name, admin, member, stranger };
}

export async function newNotebook(owner: Person, workshopId: string, title = 'Rose window') {
  return (await createNotebook(owner, { title, workshopId })).id;
}

/** The letters queued for an address, oldest first. */
export async function lettersTo(email: string): Promise<Letter[]> {
  const rows: { letter: string }[] = await database()('outgoing_mail')
    .where({ recipient: email })
    .orderBy('queued_at')
    .select('letter');
  return rows.map(({ letter }) => JSON.parse(letter) as Letter);
}

/** The token in the newest letter to an address. */
export async function tokenFor(email: string): Promise<string> {
  const url = (await lettersTo(email)).at(-1)?.action?.url ?? '';
  return url.split('/').at(-1) ?? '';
}

/** The deeds on the record of a workshop, oldest first. */
export async function deedsIn(workshopId: string): Promise<string[]> {
  return database()('activity')
    .where({ workshop_id: workshopId })
    .orderBy('number')
    .pluck<string[]>('deed');
}
