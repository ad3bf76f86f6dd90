import { route } from '@/lib/http';
import { acceptInvitation } from '@/lib/workshops';

/** Accepts the invitation and says where it leads to. */
export const POST = route({ person: 'required' }, ({ person, part }) =>
  acceptInvitation(person, part('token')),
);
