'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { Role } from '@/lib/access';
import type { NamedWorkshop } from '@/lib/notebooks/types';
import { listAddress, type ShownList } from './list-address';

interface ListFiltersProps {
  shown: ShownList;
  workshops: readonly NamedWorkshop[];
  /** How many notebooks there are under these filters. */
  total: number;
}

const SELECT = 'min-h-9 max-w-full rounded-cut border border-rule bg-sheet px-2 text-small';
const LABEL = 'flex min-w-0 items-center gap-2 text-small';

const ROLES: readonly Role[] = ['owner', 'editor', 'viewer'];

/** Which notebooks the table shows, and in which order; the address says the same, so it can be kept. */
export function ListFilters({ shown, workshops, total }: ListFiltersProps) {
  const router = useRouter();
  const show = (change: Partial<ShownList>) => router.push(listAddress({ ...shown, ...change }));
  return (
    <div
      role="group"
      aria-label="Which notebooks"
      className="flex flex-wrap items-center gap-x-5 gap-y-2 border-y border-hairline py-2"
    >
      <span className="flex text-small" role="group" aria-label="In use or archived">
        {[false, true].map((archived) => (
          <Link
            key={String(archived)}
            href={listAddress({ ...shown, archived })}
            aria-current={shown.archived === archived ? 'page' : undefined}
            className={`inline-flex min-h-9 items-center border px-3 -ml-px first:ml-0 ${
              shown.archived === archived
                ? 'border-ink bg-hand font-semibold'
                : 'border-rule text-snapline hover:underline underline-offset-4'
            }`}
          >
            {archived ? 'Archived' : 'In use'}
          </Link>
        ))}
      </span>
      {workshops.length > 1 && (
        <label className={LABEL}>
          Workshop
          <select
            className={SELECT}
            value={shown.workshop ?? ''}
            onChange={(event) => show({ workshop: event.target.value || null })}
          >
            <option value="">all</option>
            {workshops.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </select>
        </label>
      )}
      <label className={LABEL}>
        My role
        <select
          className={SELECT}
          value={shown.role ?? ''}
          onChange={(event) =>
            show({ role: ROLES.find((role) => role === event.target.value) ?? null })
          }
        >
          <option value="">any</option>
          {ROLES.map((role) => (
            <option key={role}>{role}</option>
          ))}
        </select>
      </label>
      <label className={LABEL}>
        Order
        <select
          className={SELECT}
          value={shown.sort}
          onChange={(event) => show({ sort: event.target.value === 'title' ? 'title' : 'changed' })}
        >
          <option value="changed">last changed first</option>
          <option value="title">by title</option>
        </select>
      </label>
      <p role="status" className="ml-auto text-small text-soft">
        {total === 1 ? '1 notebook' : `${total} notebooks`}
      </p>
    </div>
  );
}
