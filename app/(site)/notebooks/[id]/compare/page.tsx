import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { answersFor } from '@/components/sheet/answers';
import { orNotFound } from '@/components/site/or-not-found';
import { Button, LinkButton } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import { compareVersions } from '@/components/versions/compared';
import { Comparison } from '@/components/versions/comparison';
import { RestoreButton } from '@/components/versions/restore-button';
import { ALLOWED } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { ChangesQuery, readChanges, readNotebook, readVersion } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Compare versions' };

interface PageProps {
  params: Promise<{ id: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function ComparePage({ params, searchParams }: PageProps) {
  const { id } = await params;
  const sent = await searchParams;
  const path = `/notebooks/${id}/compare`;
  const person = await personForPage(path);
  const query = ChangesQuery.safeParse({ from: sent.from, to: sent.to });
  if (!query.success) notFound();
  const { from, to } = query.data;
  const { notebook } = await orNotFound(readNotebook(person, id));
  const [before, after] = [
    await orNotFound(readVersion(person, id, from)),
    await orNotFound(readVersion(person, id, to)),
  ];
  const { words } = await orNotFound(readChanges(person, id, query.data));
  const figures = [await answersFor(before.content), await answersFor(after.content)] as const;
  const all = compareVersions(
    { content: before.content, answers: figures[0] ?? [] },
    { content: after.content, answers: figures[1] ?? [] },
  );
  const everything = sent.all === '1';
  const cells = everything ? all : all.filter(({ state }) => state !== 'same');
  const mayRestore = ALLOWED[notebook.role].has('versions.restore') && notebook.archivedAt === null;
  const here = `${path}?from=${from}&to=${to}`;
  return (
    <div className="mx-auto max-w-sheet space-y-4">
      <div>
        <p className="text-small">
          <Link
            href={`/notebooks/${id}`}
            className="text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
          >
            {notebook.title}
          </Link>
          {' · '}
          <Link
            href={`/notebooks/${id}/versions`}
            className="text-snapline underline-offset-4 hover:underline"
          >
            Versions
          </Link>
        </p>
        <h1 className="font-serif text-head font-semibold">
          Version {from} and version {to}
        </h1>
        <p className="max-w-prose">
          {from === to ? (
            'These are one and the same version.'
          ) : (
            <>
              From version {from} to version {to}: <Sentence text={words} />.
            </>
          )}
        </p>
      </div>
      <dl className="grid gap-3 sm:grid-cols-2">
        {[before.version, after.version].map((version, index) => (
          <div key={index} className="border border-rule bg-sheet px-3 py-2">
            <dt className="text-small font-semibold">Version {version.number}</dt>
            <dd className="text-small">
              {version.author}, <Moment at={version.savedAt} />
              {version.note !== null && ` · ${version.note}`}
              {mayRestore && version.number !== notebook.version && (
                <RestoreButton notebookId={id} number={version.number} head={notebook.version} />
              )}
            </dd>
          </div>
        ))}
      </dl>
      <div className="flex flex-wrap items-end justify-between gap-3">
        <form action={path} className="flex flex-wrap items-end gap-2">
          {(['from', 'to'] as const).map((name) => (
            <label key={name} className="text-small">
              <span className="block font-semibold">
                {name === 'from' ? 'From version' : 'To version'}
              </span>
              <input
                type="number"
                name={name}
                min={1}
                max={notebook.version}
                required
                defaultValue={name === 'from' ? from : to}
                className="min-h-9 w-24 border border-rule bg-sheet px-2 font-mono"
              />
            </label>
          ))}
          <Button type="submit">Compare</Button>
        </form>
        <LinkButton href={everything ? here : `${here}&all=1`} scroll={false}>
          {everything ? 'Show only what differs' : `Show all ${all.length} cells`}
        </LinkButton>
      </div>
      {figures.includes(null) && (
        <Notice tone="caution">
          The figures cannot be worked out just now; the sources are compared.
        </Notice>
      )}
      {cells.length === 0 ? (
        <Notice>No cell differs.</Notice>
      ) : (
        <Comparison cells={cells} from={from} to={to} />
      )}
    </div>
  );
}
