import { done, route } from '@/lib/http';
import { HandingOver, handOver } from '@/lib/notebooks';

export const POST = route(
  { person: 'required', body: HandingOver },
  async ({ person, part, body }) => {
    await handOver(person, part('id'), body);
    return done();
  },
);
