import { route } from '@/lib/http';
import { listMembers } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  members: await listMembers(person, part('id')),
}));
