import { Deletion, NameChange, changeName, deleteAccount } from '@/lib/accounts';
import { done, route } from '@/lib/http';

export const PATCH = route({ person: 'required', body: NameChange }, async ({ person, body }) => {
  await changeName(person, body.name);
  return done();
});

export const DELETE = route({ person: 'required', body: Deletion }, async ({ person, body }) => {
  await deleteAccount(person, body);
  return done();
});
