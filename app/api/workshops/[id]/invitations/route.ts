import { created, route } from '@/lib/http';
import { WorkshopInvitation, invite, listInvitations } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  invitations: await listInvitations(person, { workshop: part('id') }),
}));

export const POST = route(
  { person: 'required', body: WorkshopInvitation },
  async ({ person, part, body }) => created(await invite(person, { workshop: part('id') }, body)),
);
