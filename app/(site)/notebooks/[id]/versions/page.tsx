import type { Metadata } from 'next';
import Link from 'next/link';
import { VersionTable } from '@/components/versions/version-table';
import { orNotFound } from '@/components/site/or-not-found';
import { personForPage } from '@/lib/accounts/session';
import { listChecks, listVersions, readNotebook } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Versions' };

interface PageProps {
  params: Promise<{ id: string }>;
}

export default async function VersionsPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/notebooks/${id}/versions`);
  const { notebook } = await orNotFound(readNotebook(person, id));
  const { versions } = await orNotFound(listVersions(person, id));
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
          Every version that was kept stays as it was. An old one can be read, and kept again as the
          newest.
        </p>
      </div>
      <VersionTable
        notebookId={id}
        head={notebook.version}
        mayRestore={notebook.role !== 'viewer' && notebook.archivedAt === null}
        versions={versions}
        checks={await listChecks(person, id)}
      />
    </div>
  );
}
