import Link from 'next/link';
import { listAddress, type ShownList } from './list-address';

interface PagesProps {
  shown: ShownList;
  page: number;
  pages: number;
}

const LINK =
  'inline-flex min-h-9 items-center border border-rule bg-sheet px-3 text-small hover:border-ink';

/** The way to the pages before and after; nothing where there is one alone. */
export function Pages({ shown, page, pages }: PagesProps) {
  if (pages === 1) return null;
  return (
    <nav aria-label="Pages of the table" className="flex items-center justify-center gap-4">
      {page > 1 ? (
        <Link className={LINK} rel="prev" href={listAddress(shown, page - 1)}>
          Page before
        </Link>
      ) : null}
      <span className="text-small text-soft">
        page {page} of {pages}
      </span>
      {page < pages ? (
        <Link className={LINK} rel="next" href={listAddress(shown, page + 1)}>
          Next page
        </Link>
      ) : null}
    </nav>
  );
}
