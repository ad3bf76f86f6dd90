'use client';

import { useState } from 'react';

const drafts = new Map<string, string>();

/** A text being written, by what it is about: it outlives the drawer, until it is sent or the page is left. */
export function useCommentDraft(about: string, first = ''): [string, (text: string) => void] {
  const [text, setText] = useState(() => drafts.get(about) ?? first);
  const write = (next: string) => {
    if (next === first) drafts.delete(about);
    else drafts.set(about, next);
    setText(next);
  };
  return [text, write];
}
