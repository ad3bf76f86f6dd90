import { revalidated, route } from '@/lib/http';
import { templatesFor } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ request, person }) =>
  revalidated(request, { templates: await templatesFor(person) }),
);
