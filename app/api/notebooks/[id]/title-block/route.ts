import { done, route } from '@/lib/http';
import { TitleBlockEntries, changeTitleBlock } from '@/lib/notebooks';

export const PATCH = route(
  { person: 'required', body: TitleBlockEntries },
  async ({ person, part, body }) => {
    await changeTitleBlock(person, part('id'), body);
    return done();
  },
);
