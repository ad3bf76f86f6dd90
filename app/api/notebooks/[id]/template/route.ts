import { done, route } from '@/lib/http';
import { TemplateChange, changeTemplate } from '@/lib/notebooks';

export const PATCH = route(
  { person: 'required', body: TemplateChange },
  async ({ person, part, body }) => {
    await changeTemplate(person, part('id'), body);
    return done();
  },
);
