import { done, readBytes, route } from '@/lib/http';
import { IMAGE_LIMITS, putLogo, removeLogo } from '@/lib/workshops';

/** Takes the picture as it is, as the body; what it is is read from its bytes. */
export const PUT = route({ person: 'required' }, async ({ request, person, part }) => ({
  logo: await putLogo(person, part('id'), await readBytes(request, IMAGE_LIMITS.bytes)),
}));

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await removeLogo(person, part('id'));
  return done();
});
