import { route } from '@/lib/http';
import { listInvitations } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  invitations: await listInvitations(person, { notebook: part('id') }),
}));
