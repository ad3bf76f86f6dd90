import { created, route } from '@/lib/http';
import { workshopsOf } from '@/lib/accounts';
import { NewWorkshop, makeWorkshop } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person }) => ({
  workshops: await workshopsOf(person),
}));

export const POST = route({ person: 'required', body: NewWorkshop }, async ({ person, body }) =>
  created(await makeWorkshop(person, body)),
);
