import { z } from 'zod';
import { database } from '@/db/client';
import {
  countNotebooksOf,
  listNotebookWorkshopsOf,
  listNotebooksOf,
  type NotebookFilter,
} from '@/db/queries/notebooks';
import { ROLES } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import type { NotebookList } from './types';

const PAGE = 50;
const MOST = 500;

const count = (what: string, most: number) =>
  z
    .string()
    .regex(/^[1-9]\d{0,5}$/, { error: `${what} is a whole number from 1.` })
    .transform(Number)
    .refine((n) => n <= most, { error: `${what} is at most ${most}.` });

/** Which notebooks, in which order, and which part of them. */
export const ListRequest = z.strictObject({
  archived: z.enum(['0', '1']).default('0'),
  /** The id of a workshop. */
  workshop: z.string().max(40).optional(),
  role: z.enum(ROLES, { error: 'The role must be owner, editor or viewer.' }).optional(),
  sort: z.enum(['changed', 'title']).default('changed'),
  page: count('The page', 100_000).default(1),
  /** How many to a page. */
  size: count('The size', MOST).default(PAGE),
});
export type ListRequest = z.infer<typeof ListRequest>;

/**
 * The notebooks on which the person has a role, a page at a time, with the number of all that the filters have. A page
 * behind the last one is the last one.
 */
export async function listNotebooks(
  person: Person,
  { archived, workshop, role, sort, page, size }: ListRequest = ListRequest.parse({}),
): Promise<NotebookList> {
  const db = database();
  const filter: NotebookFilter = { archived: archived === '1', workshopId: workshop, role, sort };
  const [total, workshops] = await Promise.all([
    countNotebooksOf(db, person.id, filter),
    listNotebookWorkshopsOf(db, person.id),
  ]);
  const pages = Math.max(1, Math.ceil(total / size));
  const at = Math.min(page, pages);
  const part = { ...filter, limit: size, offset: (at - 1) * size };
  const entries = await listNotebooksOf(db, person.id, part);
  return {
    notebooks: entries.map((entry) => ({
      id: entry.id,
      title: entry.title,
      workshop: entry.workshop,
      role: entry.role,
      version: entry.head,
      changedAt: (entry.savedAt ?? entry.changedAt).toISOString(),
      changedBy: entry.savedBy ?? '',
      archivedAt: entry.archivedAt?.toISOString() ?? null,
      template: entry.templateSince !== null,
    })),
    total,
    page: at,
    pages,
    workshops,
  };
}
