import type { Database } from '../client';
import type { NotebookRole } from './notebooks';

/** Stands between the texts of two cells; nobody types it. */
export const CELL_BREAK = '\u001e';

/** How much of a notebook's text is read back to show a place in it. */
const SHOWN = 200_000;

export interface SearchText {
  version: number;
  title: string;
  /** The ids of the cells and their texts, in order of the sheet. */
  cells: readonly { id: string; text: string }[];
}

/** Stores what a notebook is found by, in place of what was stored before. */
export async function putSearchText(
  db: Database,
  notebookId: string,
  { version, title, cells }: SearchText,
): Promise<void> {
  await db('notebook_search')
    .insert({
      notebook_id: notebookId,
      version,
      title,
      body: cells.map(({ text }) => text).join(CELL_BREAK),
      cells: cells.map(({ id }) => id).join(' '),
    })
    .onConflict('notebook_id')
    .merge(['version', 'title', 'body', 'cells']);
}

export async function putSearchTitle(
  db: Database,
  notebookId: string,
  title: string,
): Promise<void> {
  await db('notebook_search').where({ notebook_id: notebookId }).update({ title });
}

export interface StoredMark {
  cellId: string;
  /** The line in the cell, from 1. */
  line: number;
  mark: string;
  definition: string;
}

interface MarkRow {
  notebook_id: string;
  cell_id: string;
  line: number;
  mark: string;
  definition: string;
}

const placeOf = ({ cellId, line }: { cellId: string; line: number }) => `${cellId} ${line}`;
const BATCH = 500;

/**
 * Makes these the marks that a notebook defines. Only what differs is written, and rows are deleted by their whole key:
 * a sweep over a notebook's rows would hold the gap beside them, and savers of two new notebooks would wait for each other.
 */
export async function putMarks(
  db: Database,
  notebookId: string,
  marks: readonly StoredMark[],
): Promise<void> {
  const rows = await db<MarkRow>('notebook_marks').where({ notebook_id: notebookId });
  const stored = new Map(
    rows.map((row) => [placeOf({ cellId: row.cell_id, line: row.line }), row]),
  );
  const wanted = new Map(marks.map((mark) => [placeOf(mark), mark]));
  const gone = rows.filter((row) => !wanted.has(placeOf({ cellId: row.cell_id, line: row.line })));
  const fresh = marks.filter((one) => {
    const row = stored.get(placeOf(one));
    return row?.mark !== one.mark || row.definition !== one.definition;
  });
  for (let from = 0; from < gone.length; from += BATCH) {
    const keys = gone.slice(from, from + BATCH).map((row) => [notebookId, row.cell_id, row.line]);
    await db('notebook_marks').whereIn(['notebook_id', 'cell_id', 'line'], keys).delete();
  }
  for (let from = 0; from < fresh.length; from += BATCH) {
    const values = fresh.slice(from, from + BATCH).map(({ cellId, line, mark, definition }) => ({
      notebook_id: notebookId,
      cell_id: cellId,
      line,
      mark,
      definition,
    }));
    await db('notebook_marks')
      .insert(values)
      .onConflict(['notebook_id', 'cell_id', 'line'])
      .merge(['mark', 'definition']);
  }
}

/** Notebooks whose search text is missing or older than their newest version; at most `limit`. */
export async function listUnsearchable(
  db: Database,
  limit: number,
): Promise<{ id: string; title: string; version: number; content: unknown }[]> {
  const rows = await db('notebooks')
    .leftJoin('notebook_search', 'notebook_search.notebook_id', 'notebooks.id')
    .join('versions', function () {
      this.on('versions.notebook_id', 'notebooks.id').andOn('versions.number', 'notebooks.head');
    })
    .whereRaw('(notebook_search.version is null or notebook_search.version <> notebooks.head)')
    .orderBy('notebooks.id')
    .limit(limit)
    .select<{ id: string; title: string; head: number; content: string }[]>(
      'notebooks.id',
      'notebooks.title',
      'notebooks.head',
      'versions.content',
    );
  return rows.map(({ id, title, head, content }) => ({
    id,
    title,
    version: head,
    content: JSON.parse(content) as unknown,
  }));
}

/** What is looked for, cut into parts that the database takes as they are: letters, digits and underscores. */
export interface SearchWords {
  /** Long enough for the full-text index, and not among its commonest words. */
  long: readonly string[];
  /** The others: looked for beside a long one, and by themselves in titles alone. */
  short: readonly string[];
  /** A name that may be a mark, where nothing else is asked for. */
  mark: string | null;
}

/** How a notebook was found, best first: it defines the mark, its title says it, it defines a longer mark, its text says it. */
export type HitRank = 0 | 1 | 2 | 3;

/** The last hit of a page; the next page begins behind it. */
export interface HitPlace {
  rank: HitRank;
  changedAt: Date;
  id: string;
}

export interface Hit extends HitPlace {
  title: string;
  workshop: { id: string; name: string };
  role: NotebookRole;
  archivedAt: Date | null;
  /** The first of its text, cells apart by CELL_BREAK. */
  body: string;
  cells: readonly string[];
}

interface HitRow {
  rank_of_hit: HitRank;
  id: string;
  title: string;
  workshop_id: string;
  workshop_name: string;
  role: NotebookRole;
  archived_at: Date | null;
  changed_at: Date;
  body: string;
  cells: string;
}

const likeEscaped = (text: string) => text.replace(/[\\%_]/g, (sign) => `\\${sign}`);
/** The beginning of a word, which the words asked for are. */
const beginning = (word: string) => `(?i)(?<![\\p{L}\\p{N}_])${word}`;

export interface HitQuery {
  words: SearchWords;
  archived: boolean;
  after: HitPlace | null;
  limit: number;
}

/**
 * The notebooks on which a person has a role and that hold all the words, best first, of one rank the last changed
 * first. Every branch joins the person's roles, so that nothing is ever read of another notebook.
 */
export async function findHits(
  db: Database,
  userId: string,
  { words, archived, after, limit }: HitQuery,
): Promise<Hit[]> {
  const { long, short, mark } = words;
  const mine = 'join notebook_roles r on r.user_id = ? and r.notebook_id =';
  const inTitle = [...long, ...short].map(() => 's.title like ?').join(' and ');
  const titles = [...long, ...short].map((word) => `%${likeEscaped(word)}%`);
  const where: string[] = short.map(() =>
    long.length > 0 ? '(s.title regexp ? or s.body regexp ?)' : 's.title regexp ?',
  );
  const values = short.flatMap((word) =>
    long.length > 0 ? [beginning(word), beginning(word)] : [beginning(word)],
  );
  if (long.length > 0) {
    where.unshift('match(s.title, s.body) against (? in boolean mode)');
    values.unshift(long.map((word) => `+${word}*`).join(' '));
  }
  const branches = [
    `select s.notebook_id, if(${inTitle}, 1, 3) as hit from notebook_search s ${mine} s.notebook_id
      where ${where.join(' and ')}`,
  ];
  const bindings: (string | number | Date)[] = [...titles, userId, ...values];
  if (mark !== null) {
    branches.push(
      `select m.notebook_id, if(m.mark = ?, 0, 2) as hit from notebook_marks m ${mine} m.notebook_id
        where m.mark like ?`,
    );
    bindings.push(mark, userId, `${likeEscaped(mark)}%`);
  }
  const behind =
    after === null
      ? ''
      : `and (h.hit > ? or (h.hit = ? and (n.changed_at < ? or (n.changed_at = ? and n.id > ?))))`;
  const place =
    after === null ? [] : [after.rank, after.rank, after.changedAt, after.changedAt, after.id];
  const [rows] = (await db.raw(
    `select h.hit as rank_of_hit, n.id, n.title, n.archived_at, n.changed_at, mine.role,
        w.id as workshop_id, w.name as workshop_name, left(t.body, ${SHOWN}) as body, t.cells
      from (select notebook_id, min(hit) as hit from (${branches.join(' union all ')}) found
        group by notebook_id) h
      join notebooks n on n.id = h.notebook_id
      join notebook_roles mine on mine.notebook_id = n.id and mine.user_id = ?
      join workshops w on w.id = n.workshop_id
      join notebook_search t on t.notebook_id = n.id
      where n.archived_at is ${archived ? 'not null' : 'null'} ${behind}
      order by h.hit, n.changed_at desc, n.id limit ?`,
    [...bindings, userId, ...place, limit],
  )) as [HitRow[]];
  return rows.map((row) => ({
    rank: row.rank_of_hit,
    id: row.id,
    title: row.title,
    workshop: { id: row.workshop_id, name: row.workshop_name },
    role: row.role,
    archivedAt: row.archived_at,
    changedAt: row.changed_at,
    body: row.body,
    cells: row.cells === '' ? [] : row.cells.split(' '),
  }));
}

/** Of each of these notebooks the marks that begin so, an equal one first; at most `limit` altogether. */
export async function listMarksLike(
  db: Database,
  notebookIds: readonly string[],
  mark: string,
  limit: number,
): Promise<(StoredMark & { notebookId: string })[]> {
  const rows = await db<MarkRow>('notebook_marks')
    .whereIn('notebook_id', notebookIds)
    .whereRaw('mark like ?', [`${likeEscaped(mark)}%`])
    .orderBy([
      { column: 'mark' },
      { column: 'notebook_id' },
      { column: 'cell_id' },
      { column: 'line' },
    ])
    .limit(limit);
  return rows.map((row) => ({
    notebookId: row.notebook_id,
    cellId: row.cell_id,
    line: row.line,
    mark: row.mark,
    definition: row.definition,
  }));
}
