import type { Metadata } from 'next';
import Link from 'next/link';
import { NewNotebook } from '@/components/notebooks/new-notebook';
import { NotebookTable } from '@/components/notebooks/notebook-table';
import { workshopsOf } from '@/lib/accounts';
import { personForPage } from '@/lib/accounts/session';
import { listNotebooks } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Notebooks' };

interface PageProps {
  searchParams: Promise<{ archived?: string | string[] }>;
}

export default async function NotebooksPage({ searchParams }: PageProps) {
  const person = await personForPage('/notebooks');
  const archived = (await searchParams).archived === '1';
  const [notebooks, workshops] = await Promise.all([
    listNotebooks(person, { archived }),
    workshopsOf(person),
  ]);
  const lines = archived ? notebooks.filter((one) => one.archivedAt !== null) : notebooks;
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h1 className="font-serif text-head font-semibold">
          {archived ? 'Archived notebooks' : 'Notebooks'}
        </h1>
        <div className="flex flex-wrap items-center gap-4">
          <Link
            href={archived ? '/notebooks' : '/notebooks?archived=1'}
            className="text-small text-snapline underline-offset-4 hover:underline"
          >
            {archived ? 'Notebooks in use' : 'Archived notebooks'}
          </Link>
          <NewNotebook workshops={workshops} />
        </div>
      </div>
      <NotebookTable notebooks={lines} archived={archived} />
    </div>
  );
}
