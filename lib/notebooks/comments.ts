import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction, type Database } from '@/db/client';
import {
  changeComment as changeText,
  countComments,
  deleteComments,
  emptyComment,
  findComment,
  insertComment,
  listComments,
  listThread,
  namesMentioned,
  putMentions,
  setResolved,
  type Comment,
} from '@/db/queries/comments';
import { listNotebookPeople } from '@/db/queries/notebook-roles';
import type { Notebook } from '@/db/queries/notebooks';
import { Failure } from '@/lib/access';
import { LIMITS, countAgainst, isId, type Person } from '@/lib/accounts';
import { nameOfCell } from './cell-name';
import { COMMENT_LIMITS, lengthOfComment, mentionedIn } from './comment-text';
import { queueMentions } from './comment-letter';
import { CONTENT_LIMITS } from './content-values';
import { holdFor, openFor } from './guard';
import type { CommentsView, CommentThread, MadeComment } from './types';
import { contentOf, getVersion } from './versions';

/** Comments on one notebook, answers and withdrawn ones included. */
const MOST = 2_000;

export const CommentText = z
  .string({ error: 'The comment is missing.' })
  .transform((text) => text.replace(/\r\n?/g, '\n').replace(/\t/g, ' ').trim())
  .pipe(
    z
      .string()
      .min(1, { error: 'The comment is empty.' })
      .refine((text) => lengthOfComment(text) <= COMMENT_LIMITS.length, {
        error: (issue) =>
          `The comment has ${lengthOfComment(issue.input as string)} characters; ` +
          `at most ${COMMENT_LIMITS.length} are allowed.`,
      })
      .refine((text) => mentionedIn(text).length <= COMMENT_LIMITS.mentions, {
        error: `A comment mentions at most ${COMMENT_LIMITS.mentions} people.`,
      })
      .refine((text) => /^(?:\n|[^\p{Cc}\p{Cs}])*$/u.test(text), {
        error: 'The comment contains characters that cannot be printed.',
      }),
  );

/** A comment that begins a thread on a cell, or one that answers in a thread. */
export const NewComment = z
  .strictObject({
    cell: z.string().max(CONTENT_LIMITS.cellId).optional(),
    thread: z.string().optional(),
    text: CommentText,
  })
  .refine(({ cell, thread }) => (cell === undefined) !== (thread === undefined), {
    error: 'Expected either the cell that the comment is about or the thread that it answers in.',
  });
export type NewComment = z.infer<typeof NewComment>;

/** Either the author's new text, or whether the thread is resolved. */
export const CommentChange = z
  .strictObject({ text: CommentText.optional(), resolved: z.boolean().optional() })
  .refine(({ text, resolved }) => (text === undefined) !== (resolved === undefined), {
    error: 'Expected either a new text, or resolved as true or false.',
  });
export type CommentChange = z.infer<typeof CommentChange>;

/** All threads on the notebook, oldest first; those on cells that have gone since as well. */
export async function readComments(person: Person, id: string): Promise<CommentsView> {
  await openFor(person, 'comments.list', id);
  const db = database();
  const [comments, names] = await Promise.all([listComments(db, id), namesMentioned(db, id)]);
  return { threads: threadsOf(comments), people: Object.fromEntries(names) };
}

/**
 * Says something about a cell, or answers in a thread. Whoever is mentioned and is on the notebook gets a letter.
 * @throws Failure `invalid` for a cell that is on no kept version's sheet, and for a mention of somebody without a role;
 *   `not-found` for an unknown thread; `resolved`, `archived`, `limit-reached`, `too-many`
 */
export async function addComment(
  person: Person,
  id: string,
  request: NewComment,
): Promise<MadeComment> {
  await openFor(person, 'comments.write', id);
  await countAgainst(LIMITS.comment, person.id);
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'comments.write', id);
    demandInUse(notebook);
    if ((await countComments(trx, id)) >= MOST) {
      throw new Failure('limit-reached', `A notebook holds at most ${MOST} comments.`);
    }
    const place =
      request.thread === undefined
        ? await namedCell(trx, notebook, request.cell ?? '')
        : await openThread(trx, id, request.thread);
    const commentId = await insertComment(trx, {
      notebookId: id,
      authorId: person.id,
      body: request.text,
      ...place,
    });
    await mention(trx, person, notebook, { id: commentId, body: request.text, ...place });
    return { id: commentId, thread: place.threadId ?? commentId };
  });
}

/**
 * Changes the author's own text, or resolves a thread and opens it again, which owners and editors do: whoever began
 * the thread as well, if that is what they are.
 * @throws Failure `not-found`, `forbidden`, `invalid`, `archived`
 */
export async function changeComment(
  person: Person,
  id: string,
  commentId: string,
  { text, resolved = false }: CommentChange,
): Promise<void> {
  await inTransaction(async (trx) => {
    if (text !== undefined) {
      const { notebook, comment } = await holdOwn(trx, person, id, commentId);
      if (comment.body === text) return;
      await changeText(trx, commentId, text);
      await mention(trx, person, notebook, { ...comment, body: text });
      return;
    }
    const { notebook } = await holdFor(trx, person, 'comments.resolve', id);
    demandInUse(notebook);
    const thread = await getThread(trx, id, commentId);
    if ((thread.resolvedAt !== null) === resolved) return;
    await setResolved(trx, commentId, resolved ? person.id : null);
  });
}

/**
 * Takes the author's own comment back. Where answers follow, its place stays, without the text; otherwise it goes, and
 * with it the withdrawn ones before it that nothing follows any more.
 * @throws Failure `not-found`, `forbidden`, `archived`
 */
export async function withdrawComment(
  person: Person,
  id: string,
  commentId: string,
): Promise<void> {
  await inTransaction(async (trx) => {
    const { comment } = await holdOwn(trx, person, id, commentId);
    const thread = await listThread(trx, id, comment.threadId);
    const left = thread.map((one) => one.id !== commentId && one.withdrawnAt === null);
    const standing = left.lastIndexOf(true) + 1;
    const gone = thread.slice(standing).map((one) => one.id);
    if (!gone.includes(commentId)) {
      await putMentions(trx, commentId, []);
      await emptyComment(trx, commentId);
    }
    // The comment that begins the thread goes last: the others refer to it.
    await deleteComments(trx, gone);
  });
}

function demandInUse(notebook: Notebook): void {
  if (notebook.archivedAt === null) return;
  throw new Failure(
    'archived',
    'This notebook is archived, so its comments stay as they are. An owner can bring it back.',
  );
}

interface CommentPlace {
  threadId?: string;
  cellId: string;
  cellName: string;
}

async function namedCell(
  trx: Knex.Transaction,
  notebook: Notebook,
  cellId: string,
): Promise<CommentPlace> {
  const { cells } = contentOf(await getVersion(trx, notebook.id, notebook.head));
  const cell = cells.find((one) => one.id === cellId);
  if (cell === undefined) {
    throw new Failure(
      'invalid',
      'This cell is not on the newest kept version, so nobody else can see it yet; keep a version first.',
    );
  }
  return { cellId, cellName: nameOfCell(cell) };
}

async function openThread(
  trx: Knex.Transaction,
  notebookId: string,
  threadId: string,
): Promise<CommentPlace> {
  const { cellId, cellName, resolvedAt } = await getThread(trx, notebookId, threadId);
  if (resolvedAt !== null) {
    throw new Failure(
      'resolved',
      'This thread is resolved. Open it again, or begin another one on the cell.',
    );
  }
  return { threadId, cellId, cellName };
}

/** The comment that begins a thread. @throws Failure `not-found` */
async function getThread(db: Database, notebookId: string, threadId: string): Promise<Comment> {
  const first = isId(threadId) ? await findComment(db, notebookId, threadId) : null;
  if (first?.threadId !== threadId) {
    throw new Failure('not-found', 'This notebook has no such thread of comments.');
  }
  return first;
}

/** A comment for its author, on a notebook that is in use. */
async function holdOwn(
  trx: Knex.Transaction,
  person: Person,
  id: string,
  commentId: string,
): Promise<{ notebook: Notebook; comment: Comment }> {
  const { notebook } = await holdFor(trx, person, 'comments.write', id);
  const comment = isId(commentId) ? await findComment(trx, id, commentId) : null;
  if (comment === null || comment.withdrawnAt !== null) {
    throw new Failure('not-found', 'This notebook has no such comment, or it was withdrawn.');
  }
  if (comment.author.id !== person.id) {
    throw new Failure('forbidden', 'Only whoever wrote a comment changes or withdraws it.');
  }
  demandInUse(notebook);
  return { notebook, comment };
}

/** Notes whom a comment mentions and writes to them. @throws Failure `invalid` for somebody without a role */
async function mention(
  trx: Knex.Transaction,
  author: Person,
  notebook: Notebook,
  comment: { id: string; body: string; threadId?: string; cellId: string; cellName: string },
): Promise<void> {
  const ids = mentionedIn(comment.body);
  const onNotebook = ids.length === 0 ? [] : await listNotebookPeople(trx, notebook.id);
  const people = new Map(onNotebook.map((one) => [one.id, one]));
  if (ids.some((one) => !people.has(one))) {
    throw new Failure('invalid', 'The comment mentions somebody who is not on this notebook.');
  }
  await putMentions(trx, comment.id, ids);
  await queueMentions(trx, { author, notebook, comment, mentioned: ids, people });
}

function threadsOf(comments: readonly Comment[]): CommentThread[] {
  const threads = new Map<string, CommentThread>();
  // A thread's first comment is its oldest, so it comes before its answers.
  for (const comment of comments) {
    const said = {
      id: comment.id,
      author: comment.author,
      text: comment.body,
      saidAt: comment.saidAt.toISOString(),
      editedAt: comment.editedAt?.toISOString() ?? null,
      withdrawn: comment.withdrawnAt !== null,
    };
    const thread = threads.get(comment.threadId);
    if (thread) thread.comments.push(said);
    else
      threads.set(comment.threadId, {
        id: comment.threadId,
        cell: comment.cellId,
        cellName: comment.cellName,
        resolvedAt: comment.resolvedAt?.toISOString() ?? null,
        resolvedBy: comment.resolvedBy,
        comments: [said],
      });
  }
  return [...threads.values()];
}
