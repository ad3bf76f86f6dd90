import type { Metadata } from 'next';
import { ListFilters } from '@/components/notebooks/list-filters';
import { NewNotebook } from '@/components/notebooks/new-notebook';
import { NotebookTable } from '@/components/notebooks/notebook-table';
import { Pages } from '@/components/notebooks/pages';
import { workshopsOf } from '@/lib/accounts';
import { personForPage } from '@/lib/accounts/session';
import { ListRequest, listNotebooks, templatesFor } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Notebooks' };

interface PageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const FIELDS = ['archived', 'workshop', 'role', 'sort', 'page'] as const;

/** What an address asks for; whatever it asks that cannot be is left out. */
function requestOf(parameters: Awaited<PageProps['searchParams']>): ListRequest {
  const sound = FIELDS.flatMap((name) => {
    const value = parameters[name];
    return ListRequest.safeParse({ [name]: value }).success ? [[name, value] as const] : [];
  });
  return ListRequest.parse(Object.fromEntries(sound));
}

export default async function NotebooksPage({ searchParams }: PageProps) {
  const person = await personForPage('/notebooks');
  const request = requestOf(await searchParams);
  const [list, workshops, templates] = await Promise.all([
    listNotebooks(person, request),
    workshopsOf(person),
    templatesFor(person),
  ]);
  const { archived, workshop = null, role = null, sort } = request;
  const shown = { archived: archived === '1', workshop, role, sort };
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h1 className="font-serif text-head font-semibold">
          {shown.archived ? 'Archived notebooks' : 'Notebooks'}
        </h1>
        <NewNotebook workshops={workshops} templates={templates} />
      </div>
      <ListFilters shown={shown} workshops={list.workshops} total={list.total} />
      <NotebookTable
        notebooks={list.notebooks}
        workshops={workshops}
        archived={shown.archived}
        filtered={workshop !== null || role !== null}
      />
      <Pages shown={shown} page={list.page} pages={list.pages} />
    </div>
  );
}
