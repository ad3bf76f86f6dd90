import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { DuplicateVersion } from '@/components/notebooks/duplicate-version';
import { answersFor } from '@/components/sheet/answers';
import { ReadOnlySheet } from '@/components/sheet/read-only-sheet';
import { blockOf, titleFields } from '@/components/sheet/title-fields';
import { orNotFound } from '@/components/site/or-not-found';
import { Download } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { RestoreButton } from '@/components/versions/restore-button';
import { VersionChecks } from '@/components/versions/version-checks';
import { sayNote } from '@/components/versions/history-list';
import { ALLOWED } from '@/lib/access';
import { workshopsOf } from '@/lib/accounts';
import { personForPage } from '@/lib/accounts/session';
import { listChecks, readNotebook, readVersion } from '@/lib/notebooks';

interface PageProps {
  params: Promise<{ id: string; number: string }>;
}

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  return { title: `Version ${(await params).number}` };
}

export default async function VersionPage({ params }: PageProps) {
  const { id, number } = await params;
  const person = await personForPage(`/notebooks/${id}/versions/${number}`);
  if (!/^[1-9]\d{0,8}$/.test(number)) notFound();
  const { notebook } = await orNotFound(readNotebook(person, id));
  const { version, content } = await orNotFound(readVersion(person, id, Number(number)));
  const answers = await answersFor(content);
  const old = version.number !== notebook.version;
  const note = sayNote(version);
  const checks = (await listChecks(person, id)).filter((one) => one.version === version.number);
  return (
    <div className="mx-auto max-w-sheet space-y-3 print:max-w-none">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2 print:hidden">
        <div className="min-w-0">
          <p className="text-small">
            <Link
              href={`/notebooks/${id}/versions`}
              className="text-snapline underline-offset-4 hover:underline"
            >
              Versions
            </Link>
          </p>
          <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
            {notebook.title}, version {version.number}
          </h1>
          <p className="text-small text-soft">
            Kept by {version.author}, <Moment at={version.savedAt} />
            {note && ` · ${note}`}
          </p>
        </div>
        <div className="flex flex-wrap gap-2">
          <Download href={`/api/notebooks/${id}/export?format=json&version=${version.number}`}>
            JSON
          </Download>
          <Download href={`/api/notebooks/${id}/export?format=tex&version=${version.number}`}>
            TeX
          </Download>
          <Download href={`/api/notebooks/${id}/export?format=csv&version=${version.number}`}>
            CSV
          </Download>
          <DuplicateVersion
            notebook={notebook}
            version={version.number}
            workshops={await workshopsOf(person)}
          />
          {old &&
            ALLOWED[notebook.role].has('versions.restore') &&
            notebook.archivedAt === null && (
              <RestoreButton notebookId={id} number={version.number} head={notebook.version} />
            )}
        </div>
      </div>
      <VersionChecks
        notebookId={id}
        number={version.number}
        checks={checks}
        mayCheck={
          ALLOWED[notebook.role].has('versions.check') &&
          notebook.archivedAt === null &&
          !checks.some((one) => one.person.id === person.id)
        }
      />
      {old && (
        <Notice tone="caution" title="Superseded">
          This is not the newest version; version {notebook.version} is.
        </Notice>
      )}
      {answers === null && (
        <Notice tone="caution">
          The figures cannot be worked out just now; the sources are shown.
        </Notice>
      )}
      <ReadOnlySheet
        content={content}
        answers={answers ?? []}
        fields={titleFields({
          block: blockOf(notebook, version.author),
          version: version.number,
          savedAt: version.savedAt,
          settings: content.settings,
          logoAt: `/api/notebooks/${id}/logo`,
        })}
      />
    </div>
  );
}
