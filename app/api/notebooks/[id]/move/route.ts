import { done, route } from '@/lib/http';
import { MoveRequest, moveNotebook } from '@/lib/notebooks';

export const POST = route(
  { person: 'required', body: MoveRequest },
  async ({ person, part, body }) => {
    await moveNotebook(person, part('id'), body);
    return done();
  },
);
