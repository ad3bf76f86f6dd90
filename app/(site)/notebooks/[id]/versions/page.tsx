import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { orNotFound } from '@/components/site/or-not-found';
import { LinkButton } from '@/components/ui/button';
import { HistoryList } from '@/components/versions/history-list';
import { ALLOWED } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { EntriesQuery, listChecks, listHistory, readNotebook } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Versions' };

interface PageProps {
  params: Promise<{ id: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function VersionsPage({ params, searchParams }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/notebooks/${id}/versions`);
  const { before } = await searchParams;
  const query = EntriesQuery.safeParse(before === undefined ? {} : { before });
  if (!query.success) notFound();
  const { notebook } = await orNotFound(readNotebook(person, id));
  const { entries, next } = await orNotFound(listHistory(person, id, query.data));
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div>
        <p className="text-small">
          <Link
            href={`/notebooks/${id}`}
            className="text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
          >
            {notebook.title}
          </Link>
        </p>
        <h1 className="font-serif text-head font-semibold">Versions</h1>
        <p className="max-w-prose text-soft">
          Every version stays as it was saved. Any two can be compared, and an old one can be read
          and kept again as the newest.
        </p>
      </div>
      <HistoryList
        notebookId={id}
        head={notebook.version}
        mayRestore={ALLOWED[notebook.role].has('versions.restore') && notebook.archivedAt === null}
        entries={entries}
        checks={await listChecks(person, id)}
      />
      <nav aria-label="Pages of the history" className="flex flex-wrap gap-2">
        {query.data.before !== undefined && (
          <LinkButton href={`/notebooks/${id}/versions`}>Newest versions</LinkButton>
        )}
        {next !== null && (
          <LinkButton href={`/notebooks/${id}/versions?before=${next}`}>Older versions</LinkButton>
        )}
      </nav>
    </div>
  );
}
