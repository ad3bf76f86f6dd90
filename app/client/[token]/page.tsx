import type { Metadata } from 'next';
import { cache } from 'react';
import { answersFor } from '@/components/sheet/answers';
import { ReadOnlySheet } from '@/components/sheet/read-only-sheet';
import { titleFields } from '@/components/sheet/title-fields';
import { orNotFound } from '@/components/site/or-not-found';
import { Download } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { readByToken } from '@/lib/notebooks';

interface PageProps {
  params: Promise<{ token: string }>;
}

const open = cache((token: string) => orNotFound(readByToken(token)));

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  const { notebook } = await open((await params).token);
  return { title: notebook.title, robots: { index: false, follow: false } };
}

export default async function ClientPage({ params }: PageProps) {
  const { token } = await params;
  const { notebook, version, content } = await open(token);
  const answers = await answersFor(content);
  return (
    <div className="mx-auto max-w-sheet space-y-3 print:max-w-none">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2 print:hidden">
        <div className="min-w-0">
          <p className="text-small text-soft">{notebook.workshop}</p>
          <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
            {notebook.title}
          </h1>
          <p className="text-small text-soft">
            Version {version.number}, kept <Moment at={version.savedAt} /> · to read and to export
          </p>
        </div>
        <div className="flex flex-wrap gap-2">
          <Download href={`/api/client/${token}/export?format=json`}>Export JSON</Download>
          <Download href={`/api/client/${token}/export?format=tex`}>Export TeX</Download>
        </div>
      </div>
      {answers === null && (
        <Notice tone="caution">
          The figures cannot be worked out just now; the sources are shown. Come back in a minute.
        </Notice>
      )}
      <ReadOnlySheet
        content={content}
        answers={answers ?? []}
        fields={titleFields({
          block: {
            legalOwner: notebook.workshop,
            identificationNumber: notebook.id.slice(0, 8),
            title: notebook.title,
            supplementaryTitle: '',
            creator: '',
            approvalPerson: '',
            sheet: '1',
            toleranceClass: null,
            logo: null,
          },
          version: version.number,
          savedAt: version.savedAt,
          settings: content.settings,
          logoAt: `/api/client/${token}/logo`,
        })}
      />
    </div>
  );
}
