import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface Comment {
  id: string;
  /** The comment that begins the thread; of that comment, its own id. */
  threadId: string;
  cellId: string;
  /** What the cell was called when the thread began. */
  cellName: string;
  author: { id: string; name: string };
  body: string;
  saidAt: Date;
  editedAt: Date | null;
  withdrawnAt: Date | null;
  /** Of the comment that begins a thread. */
  resolvedAt: Date | null;
  resolvedBy: string | null;
}

interface CommentRow {
  id: string;
  thread_id: string;
  cell_id: string;
  cell_name: string;
  author_id: string;
  author_name: string;
  body: string;
  said_at: Date;
  edited_at: Date | null;
  withdrawn_at: Date | null;
  resolved_at: Date | null;
  resolver_name: string | null;
}

const toComment = (row: CommentRow): Comment => ({
  id: row.id,
  threadId: row.thread_id,
  cellId: row.cell_id,
  cellName: row.cell_name,
  author: { id: row.author_id, name: row.author_name },
  body: row.body,
  saidAt: row.said_at,
  editedAt: row.edited_at,
  withdrawnAt: row.withdrawn_at,
  resolvedAt: row.resolved_at,
  resolvedBy: row.resolver_name,
});

const ofNotebook = (db: Database, notebookId: string) =>
  db('comments')
    .join('users', 'users.id', 'comments.author_id')
    .leftJoin('users as resolvers', 'resolvers.id', 'comments.resolved_by')
    .where('comments.notebook_id', notebookId)
    .select('comments.*', 'users.name as author_name', 'resolvers.name as resolver_name');

/** All comments on a notebook, oldest first. */
export async function listComments(db: Database, notebookId: string): Promise<Comment[]> {
  const rows = (await ofNotebook(db, notebookId).orderBy([
    'comments.said_at',
    'comments.id',
  ])) as CommentRow[];
  return rows.map(toComment);
}

export async function findComment(
  db: Database,
  notebookId: string,
  id: string,
): Promise<Comment | null> {
  const row = (await ofNotebook(db, notebookId).where('comments.id', id).first()) as
    CommentRow | undefined;
  return row === undefined ? null : toComment(row);
}

/** The comments of one thread, oldest first. */
export async function listThread(
  db: Database,
  notebookId: string,
  threadId: string,
): Promise<Comment[]> {
  const rows = (await ofNotebook(db, notebookId)
    .where('comments.thread_id', threadId)
    .orderBy(['comments.said_at', 'comments.id'])) as CommentRow[];
  return rows.map(toComment);
}

export async function countComments(db: Database, notebookId: string): Promise<number> {
  const row = await db('comments')
    .where({ notebook_id: notebookId })
    .count<{ n: number }>({ n: '*' })
    .first();
  return Number(row?.n ?? 0);
}

/**
 * A short text that changes whenever a comment on the notebook is added, changed or removed. Read from an index alone,
 * so that it can be asked every few seconds.
 */
export async function commentsStamp(db: Database, notebookId: string): Promise<string> {
  const row = await db('comments')
    .where({ notebook_id: notebookId })
    .first<{ n: number; last: string | null }>(
      db.raw('count(*) as n'),
      db.raw("date_format(max(changed_at), '%Y%m%d%H%i%s%f') as last"),
    );
  return `${row.n}-${row.last ?? 0}`;
}

export interface NewComment {
  notebookId: string;
  /** Left out, the comment begins a thread. */
  threadId?: string;
  cellId: string;
  cellName: string;
  authorId: string;
  body: string;
}

const now = (db: Database) => db.raw('current_timestamp(6)');

/** Adds a comment and returns its id. */
export async function insertComment(db: Database, comment: NewComment): Promise<string> {
  const id = randomUUID();
  await db('comments').insert({
    id,
    notebook_id: comment.notebookId,
    thread_id: comment.threadId ?? id,
    cell_id: comment.cellId,
    cell_name: comment.cellName,
    author_id: comment.authorId,
    body: comment.body,
  });
  return id;
}

export async function changeComment(db: Database, id: string, body: string): Promise<void> {
  await db('comments')
    .where({ id })
    .update({ body, edited_at: now(db), changed_at: now(db) });
}

/** Takes the text of a comment away and leaves its place. */
export async function emptyComment(db: Database, id: string): Promise<void> {
  await db('comments')
    .where({ id })
    .update({ body: '', withdrawn_at: now(db), changed_at: now(db) });
}

export async function deleteComments(db: Database, ids: readonly string[]): Promise<void> {
  await db('comments').whereIn('id', ids).delete();
}

/** Resolves a thread, or opens it again with null. */
export async function setResolved(
  db: Database,
  threadId: string,
  resolvedBy: string | null,
): Promise<void> {
  await db('comments')
    .where({ id: threadId })
    .update({
      resolved_at: resolvedBy === null ? null : now(db),
      resolved_by: resolvedBy,
      changed_at: now(db),
    });
}

/** Makes these the people whom a comment mentions. */
export async function putMentions(
  db: Database,
  commentId: string,
  userIds: readonly string[],
): Promise<void> {
  await db('comment_mentions').where({ comment_id: commentId }).delete();
  if (userIds.length === 0) return;
  await db('comment_mentions').insert(
    userIds.map((userId) => ({ comment_id: commentId, user_id: userId })),
  );
}

/** The names of everybody who is mentioned on a notebook, by id, as they are now. */
export async function namesMentioned(
  db: Database,
  notebookId: string,
): Promise<Map<string, string>> {
  const rows = await db('comment_mentions')
    .join('comments', 'comments.id', 'comment_mentions.comment_id')
    .join('users', 'users.id', 'comment_mentions.user_id')
    .where('comments.notebook_id', notebookId)
    .distinct<{ id: string; name: string }[]>('users.id', 'users.name');
  return new Map(rows.map(({ id, name }) => [id, name]));
}

/** Everything a person has said, as the export of their account shows it, oldest first. */
export async function listCommentsBy(
  db: Database,
  authorId: string,
): Promise<{ notebookId: string; cell: string; body: string; saidAt: Date }[]> {
  const rows: { notebook_id: string; cell_name: string; body: string; said_at: Date }[] = await db(
    'comments',
  )
    .where({ author_id: authorId, withdrawn_at: null })
    .orderBy(['said_at', 'id'])
    .select('notebook_id', 'cell_name', 'body', 'said_at');
  return rows.map((row) => ({
    notebookId: row.notebook_id,
    cell: row.cell_name,
    body: row.body,
    saidAt: row.said_at,
  }));
}
