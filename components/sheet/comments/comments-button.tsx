'use client';

import { Button } from '@/components/ui/button';
import { COMMENTS_BUTTON, useCommentsOnSheet } from './comments-context';

/** In the bar of the sheet: how many threads are open, and the way to all of them. */
export function CommentsButton() {
  const comments = useCommentsOnSheet();
  if (comments === null) return null;
  const { open, show } = comments;
  return (
    <Button id={COMMENTS_BUTTON} onClick={() => show(null)}>
      Comments
      {open > 0 && (
        <span className="border-l border-rule pl-2 font-mono tabular-nums text-ruddle">
          {open}
          <span className="sr-only"> open</span>
        </span>
      )}
    </Button>
  );
}
