import { KeyRequest, createKey, listKeys } from '@/lib/accounts';
import { created, route } from '@/lib/http';

export const GET = route({ person: 'required' }, async ({ person }) => ({
  keys: await listKeys(person),
}));

export const POST = route({ person: 'required', body: KeyRequest }, async ({ person, body }) =>
  created(await createKey(person, body)),
);
