'use client';

import { commentMarkId, useCommentsOnSheet } from './comments-context';

interface CommentMarkProps {
  id: string;
  /** The cell as its neighbours call it. */
  name: string;
  /** Reached by Tab although nothing was said yet: where no key or tool of the cell begins a thread. */
  reachable: boolean;
}

const threads = (count: number, what: string) =>
  `${count} ${what} ${count === 1 ? 'thread' : 'threads'} of comments`;

/** In the margin of a cell: how many threads about it are open, or a place to begin one. */
export function CommentMark({ id, name, reachable }: CommentMarkProps) {
  const comments = useCommentsOnSheet();
  const { open, resolved } = comments?.counts.get(id) ?? { open: 0, resolved: 0 };
  const none = open + resolved === 0;
  if (comments === null || (none && !comments.mayWrite)) return null;
  const says = none
    ? `Comment on ${name}`
    : `${name}: ${open > 0 ? threads(open, 'open') : threads(resolved, 'resolved')}`;
  return (
    <button
      type="button"
      id={commentMarkId(id)}
      tabIndex={none && !reachable ? -1 : 0}
      aria-label={says}
      title={says}
      onClick={() => comments.show(id)}
      className={`absolute -right-2 top-5 z-10 grid size-7 place-items-center sm:-right-4 print:hidden ${
        open > 0
          ? 'text-ruddle'
          : none
            ? 'text-soft opacity-0 group-hover/block:opacity-100 focus-visible:opacity-100 pointer-coarse:opacity-60'
            : 'text-soft'
      }`}
    >
      <MarkSign open={open} resolved={resolved} />
    </button>
  );
}

/** A lozenge, as notes are keyed on a drawing: filled with the number of open threads, ticked when all are resolved. */
function MarkSign({ open, resolved }: { open: number; resolved: number }) {
  const none = open + resolved === 0;
  return (
    <svg viewBox="0 0 28 28" className="size-7" aria-hidden="true">
      <path
        d="M14 2L26 14L14 26L2 14Z"
        className="fill-sheet"
        stroke="currentColor"
        strokeWidth={open > 0 ? 1.8 : 1.2}
        strokeDasharray={none ? '2.5 2.5' : undefined}
      />
      {open > 0 ? (
        <text
          x="14"
          y="18.2"
          textAnchor="middle"
          fontSize={open > 9 ? 10 : 12}
          fontWeight="600"
          fill="currentColor"
        >
          {open > 99 ? '99+' : open}
        </text>
      ) : (
        <path
          d={none ? 'M14 9.5V18.5M9.5 14H18.5' : 'M9.5 14.5L12.8 17.8L18.5 11'}
          fill="none"
          stroke="currentColor"
          strokeWidth="1.5"
        />
      )}
    </svg>
  );
}
