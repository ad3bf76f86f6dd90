import type { Metadata } from 'next';
import Link from 'next/link';
import { ReevaluateButton } from '@/components/revisions/reevaluate-button';
import { revisionFields } from '@/components/revisions/revision-fields';
import { RevisionNote } from '@/components/revisions/revision-note';
import { Superseded } from '@/components/revisions/superseded';
import { ReadOnlySheet } from '@/components/sheet/read-only-sheet';
import { orNotFound } from '@/components/site/or-not-found';
import { Download } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { personForPage } from '@/lib/accounts/session';
import { readRevision } from '@/lib/notebooks';

interface PageProps {
  params: Promise<{ id: string; letter: string }>;
}

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  return { title: `Revision ${(await params).letter}` };
}

export default async function RevisionPage({ params }: PageProps) {
  const { id, letter } = await params;
  const person = await personForPage(`/notebooks/${id}/revisions/${letter}`);
  const issued = await orNotFound(readRevision(person, id, letter));
  const { revision, titleBlock, content, results } = issued;
  return (
    <div className="mx-auto max-w-sheet space-y-3 print:max-w-none">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2 print:hidden">
        <div className="min-w-0">
          <p className="text-small">
            <Link
              href={`/notebooks/${id}/revisions`}
              className="text-snapline underline-offset-4 hover:underline"
            >
              Revisions
            </Link>
          </p>
          <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
            {titleBlock.title}, revision {revision.letter}
          </h1>
          <p className="text-small text-soft [overflow-wrap:anywhere]">
            {revision.purpose}, issued <Moment at={revision.issuedAt} /> by {revision.issuedBy},
            from version {revision.version}
            {revision.checkedBy === null ? '' : `, checked by ${revision.checkedBy}`}
          </p>
        </div>
        <div className="flex flex-wrap gap-2">
          <ReevaluateButton notebookId={id} letter={letter} />
          {(['json', 'tex', 'csv'] as const).map((format) => (
            <Download
              key={format}
              href={`/api/notebooks/${id}/revisions/${letter}/export?format=${format}`}
            >
              {DOWNLOADS[format]}
            </Download>
          ))}
        </div>
      </div>
      {revision.supersededBy !== null && (
        <Superseded letter={revision.letter} by={revision.supersededBy} />
      )}
      <RevisionNote note={revision.note} />
      <ReadOnlySheet
        content={content}
        answers={results}
        fields={revisionFields(issued, `/api/notebooks/${id}/logo`)}
      />
    </div>
  );
}

const DOWNLOADS = { json: 'JSON', tex: 'TeX', csv: 'Marks as CSV' } as const;
