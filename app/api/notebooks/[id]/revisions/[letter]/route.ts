import { LIMITS, countAgainst } from '@/lib/accounts';
import { exportedRevision, notebookDocument } from '@/lib/exports';
import { route, taggedAs } from '@/lib/http';
import { readRevision, revisionTag } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', key: 'revisions' },
  async ({ request, person, keyId, asker, part }) => {
    await countAgainst(LIMITS.export, keyId ?? person.id);
    const [id, letter] = [part('id'), part('letter')];
    return taggedAs(request, await revisionTag(asker, id, letter), async () => {
      const open = await readRevision(asker, id, letter);
      const { results, revision } = open;
      const identity = exportedRevision(open, { forClient: false });
      return Response.json(notebookDocument(identity, results, revision.engine));
    });
  },
);
