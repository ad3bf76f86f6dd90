import type { Metadata } from 'next';
import Link from 'next/link';
import { IssueButton } from '@/components/revisions/issue-button';
import { RevisionList } from '@/components/revisions/revision-list';
import { orNotFound } from '@/components/site/or-not-found';
import { personForPage } from '@/lib/accounts/session';
import { listRevisions, readNotebook } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Revisions' };

interface PageProps {
  params: Promise<{ id: string }>;
}

export default async function RevisionsPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/notebooks/${id}/revisions`);
  const { notebook } = await orNotFound(readNotebook(person, id));
  const revisions = await orNotFound(listRevisions(person, id));
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div className="min-w-0">
          <p className="text-small">
            <Link
              href={`/notebooks/${id}`}
              className="text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
            >
              {notebook.title}
            </Link>
          </p>
          <h1 className="font-serif text-head font-semibold">Revisions</h1>
          <p className="max-w-prose text-soft">
            What has been issued stays as it was issued. Clients read the revision that their link
            leads to;{' '}
            <Link href={`/notebooks/${id}/versions`} className="underline underline-offset-4">
              versions
            </Link>{' '}
            stay in the office.
          </p>
        </div>
        {notebook.mayIssue && <IssueButton notebookId={id} head={notebook.version} />}
      </div>
      <RevisionList notebookId={id} revisions={revisions} />
    </div>
  );
}
