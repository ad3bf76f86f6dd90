import { done, route } from '@/lib/http';
import { WorkshopChange, changeWorkshop, readWorkshop } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  workshop: await readWorkshop(person, part('id')),
}));

export const PATCH = route(
  { person: 'required', body: WorkshopChange },
  async ({ person, part, body }) => {
    await changeWorkshop(person, part('id'), body);
    return done();
  },
);
