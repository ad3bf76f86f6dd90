import { created, revalidated, route } from '@/lib/http';
import { IssueRequest, issueRevision, listRevisions } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', key: 'revisions' },
  async ({ request, asker, part }) =>
    revalidated(request, { revisions: await listRevisions(asker, part('id')) }),
);

export const POST = route(
  { person: 'required', body: IssueRequest },
  async ({ person, part, body }) => created(await issueRevision(person, part('id'), body)),
);
