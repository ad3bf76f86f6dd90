import type { Metadata } from 'next';
import { cookies, headers } from 'next/headers';
import { cache } from 'react';
import { AskPassphrase, Expired, NothingIssued } from '@/components/revisions/client-messages';
import { revisionFields } from '@/components/revisions/revision-fields';
import { RevisionNote } from '@/components/revisions/revision-note';
import { Superseded } from '@/components/revisions/superseded';
import { ReadOnlySheet } from '@/components/sheet/read-only-sheet';
import { orNotFound } from '@/components/site/or-not-found';
import { Download } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { LINK_PASS } from '@/lib/http/link-pass';
import { countOpening, readByToken } from '@/lib/notebooks';

interface PageProps {
  params: Promise<{ token: string }>;
  searchParams: Promise<{ passphrase?: string | string[] }>;
}

const open = cache(async (token: string) => {
  const pass = (await cookies()).get(LINK_PASS)?.value;
  return orNotFound(readByToken(token, pass));
});

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  const view = await open((await params).token);
  const robots = { index: false, follow: false };
  if (view.kind !== 'revision') return { title: 'Client link', robots };
  const { titleBlock, revision } = view.open;
  return { title: `${titleBlock.title}, revision ${revision.letter}`, robots };
}

/*
 * The page is not answered 304 by revision as its downloads are: it carries the nonce of this very
 * answer and the names of this build's files, so that a stored copy would be stale where the revision
 * is not. It stays `private, no-store`.
 */
export default async function ClientPage({ params, searchParams }: PageProps) {
  const { token } = await params;
  const view = await open(token);
  switch (view.kind) {
    case 'expired':
      return <Expired since={view.since} />;
    case 'passphrase': {
      const { passphrase } = await searchParams;
      const state = passphrase === 'wrong' || passphrase === 'wait' ? passphrase : 'first';
      return <AskPassphrase token={token} state={state} />;
    }
    case 'nothing-issued':
      await countIfOpened(view.linkId);
      return <NothingIssued title={view.title} legalOwner={view.legalOwner} />;
    case 'revision':
      await countIfOpened(view.linkId);
      return <IssuedSheet token={token} issued={view.open} />;
  }
}

/** The proxy says what is an opening by a person: neither a prefetch nor a look at the headers alone. */
async function countIfOpened(linkId: string): Promise<void> {
  if ((await headers()).get('x-opening') === '1') await countOpening(linkId);
}

type Issued = Extract<Awaited<ReturnType<typeof readByToken>>, { kind: 'revision' }>['open'];

function IssuedSheet({ token, issued }: { token: string; issued: Issued }) {
  const { revision, titleBlock, content, results } = issued;
  return (
    <div className="mx-auto max-w-sheet space-y-3 print:max-w-none">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2 print:hidden">
        <div className="min-w-0">
          <p className="text-small text-soft">{titleBlock.legalOwner}</p>
          <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
            {titleBlock.title}
          </h1>
          <p className="text-base [overflow-wrap:anywhere]">
            <strong className="font-semibold">Revision {revision.letter}</strong>
            {`, ${revision.purpose}, issued `}
            <Moment at={revision.issuedAt} dayOnly />
            {revision.checkedBy !== null && `, checked by ${revision.checkedBy}`}
          </p>
        </div>
        <nav aria-label="Downloads" className="flex flex-wrap gap-2">
          {(['json', 'tex', 'csv'] as const).map((format) => (
            <Download key={format} href={`/api/client/${token}/export?format=${format}`}>
              {DOWNLOADS[format]}
            </Download>
          ))}
        </nav>
      </div>
      {revision.supersededBy !== null && (
        <Superseded letter={revision.letter} by={revision.supersededBy} />
      )}
      <RevisionNote note={revision.note} />
      <ReadOnlySheet
        content={content}
        answers={results}
        fields={revisionFields(issued, `/api/client/${token}/logo`)}
      />
    </div>
  );
}

const DOWNLOADS = {
  json: 'Export JSON',
  tex: 'Export TeX',
  csv: 'Marks as CSV',
} as const;
