import type { Metadata } from 'next';
import { cache } from 'react';
import { answersFor } from '@/components/sheet/answers';
import { notesOf } from '@/components/sheet/notes-of';
import { Sheet } from '@/components/sheet/sheet';
import { orNotFound } from '@/components/site/or-not-found';
import { can } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { findSeen, isHurried, readNotebook } from '@/lib/notebooks';

interface PageProps {
  params: Promise<{ id: string }>;
}

const open = cache(async (id: string) => {
  const person = await personForPage(`/notebooks/${id}`);
  return { person, ...(await orNotFound(readNotebook(person, id))) };
});

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  const { notebook } = await open((await params).id);
  return { title: notebook.title };
}

export default async function NotebookPage({ params }: PageProps) {
  const { id } = await params;
  const { person, notebook, content } = await open(id);
  const actor = { kind: 'person', id: person.id } as const;
  const guarded = { id: notebook.id, roles: new Map([[person.id, notebook.role]]) };
  const answers = await answersFor(content);
  const inUse = notebook.archivedAt === null;
  return (
    <div className="mx-auto max-w-sheet print:max-w-none">
      <Sheet
        key={notebook.id}
        notebook={notebook}
        content={content}
        answers={answers === null || isHurried(answers) ? null : answers}
        notes={notesOf(content)}
        personId={person.id}
        seenBefore={await findSeen(person, id)}
        mayWrite={inUse && can(actor, 'versions.save', guarded)}
        mayShare={can(actor, 'people.change', guarded)}
      />
    </div>
  );
}
