import { created, route } from '@/lib/http';
import { CheckRequest, checkVersion, listChecks } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ person, part, count }) => ({
  checks: (await listChecks(person, part('id'))).filter(
    ({ version }) => version === count('number'),
  ),
}));

export const POST = route(
  { person: 'required', body: CheckRequest },
  async ({ person, part, count, body }) =>
    created(await checkVersion(person, part('id'), count('number'), body)),
);
