import type { Role } from '@/lib/access';

/** What the table of notebooks shows and in which order. */
export interface ShownList {
  archived: boolean;
  /** The id of a workshop, or null for all. */
  workshop: string | null;
  role: Role | null;
  sort: 'changed' | 'title';
}

/** The address of such a table; what is as usual is not in it. */
export function listAddress({ archived, workshop, role, sort }: ShownList, page = 1): string {
  const query = new URLSearchParams();
  if (archived) query.set('archived', '1');
  if (workshop !== null) query.set('workshop', workshop);
  if (role !== null) query.set('role', role);
  if (sort !== 'changed') query.set('sort', sort);
  if (page > 1) query.set('page', String(page));
  return query.size === 0 ? '/notebooks' : `/notebooks?${query.toString()}`;
}
