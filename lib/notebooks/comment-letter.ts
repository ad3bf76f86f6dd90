import type { Knex } from 'knex';
import type { NotebookPerson } from '@/db/queries/notebook-roles';
import type { Notebook } from '@/db/queries/notebooks';
import type { Person } from '@/lib/accounts';
import { env } from '@/lib/env';
import { queueLetter } from '@/lib/mail';
import { readableComment } from './comment-text';

/** So much of a comment stands in a letter; the rest is read on the sheet. */
const EXCERPT = 400;

interface Mentions {
  author: Person;
  notebook: Notebook;
  comment: { id: string; body: string; threadId?: string; cellId: string; cellName: string };
  /** Ids of those who are mentioned. */
  mentioned: readonly string[];
  /** Everybody on the notebook, by id. */
  people: ReadonlyMap<string, NotebookPerson>;
}

/** Writes to everybody who is mentioned but the author: once for a comment, however often it is changed. */
export async function queueMentions(trx: Knex.Transaction, mentions: Mentions): Promise<void> {
  const { author, notebook, comment, mentioned, people } = mentions;
  const nameOf = (id: string) => people.get(id)?.name ?? 'somebody';
  const text = [...readableComment(comment.body, nameOf)];
  const excerpt = text.length > EXCERPT ? `${text.slice(0, EXCERPT).join('')}…` : text.join('');
  const url = new URL(`/notebooks/${notebook.id}`, env().NEXTAUTH_URL);
  url.searchParams.set('comment', comment.threadId ?? comment.id);
  url.hash = `cell-${comment.cellId}`;
  for (const id of mentioned) {
    const person = people.get(id);
    if (person === undefined || id === author.id) continue;
    await queueLetter(
      trx,
      {
        to: person.email,
        name: person.name,
        subject: cutTo(300, `${author.name} mentions you on “${notebook.title}”`),
        paragraphs: [
          `${author.name} wrote about “${comment.cellName}” on the notebook “${notebook.title}”:`,
          ...excerpt.split('\n').filter((line) => line.trim() !== ''),
        ],
        action: { label: 'Read and answer it on the sheet', url: url.href },
        reason: 'You get this letter because a comment on a notebook of yours mentions you.',
      },
      `mention:${comment.id}:${id}`,
    );
  }
}

const cutTo = (length: number, text: string) => [...text].slice(0, length).join('');
