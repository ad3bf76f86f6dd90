import { LIMITS, countAgainst } from '@/lib/accounts';
import { download, route } from '@/lib/http';
import { ActivityQuery, exportActivity } from '@/lib/workshops';

export const GET = route(
  { person: 'required', query: ActivityQuery },
  async ({ person, part, query }) => {
    const { name, text } = await exportActivity(person, part('id'), query);
    await countAgainst(LIMITS.export, person.id);
    return download(text, 'text/csv', name);
  },
);
