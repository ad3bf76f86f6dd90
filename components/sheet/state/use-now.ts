'use client';

import { useEffect, useRef } from 'react';
import useSWR from 'swr';
import type { Now, OpenVersion } from '@/lib/notebooks/types';
import { ask } from '@/components/ui/ask';
import type { NotebookOnScreen } from './use-notebook';

/** Milliseconds between two looks while the page is seen, and while it is not. */
const SEEN = 3_000;
const HIDDEN = 20_000;

/**
 * Asks every few seconds what is news on the notebook, says that one is here, and takes a newer version in. The
 * browser keeps the answer with its tag, so that mostly nothing but a 304 comes.
 */
export function useNow(id: string, sheet: NotebookOnScreen, cell: string | null): Now | null {
  const { kept, takeHead } = sheet;
  const mine = useRef({ seen: kept.number, cell });
  useEffect(() => {
    mine.current = { seen: kept.number, cell };
  });
  const { data } = useSWR<Now>(
    ['now', id],
    () => {
      const { seen, cell: inHand } = mine.current;
      const hand = inHand === null ? '' : `&cell=${inHand}`;
      return ask<Now>(`/api/notebooks/${id}/now?seen=${seen}${hand}`);
    },
    {
      refreshInterval: () => (document.hidden ? HIDDEN : SEEN),
      refreshWhenHidden: true,
      dedupingInterval: 500,
      errorRetryInterval: SEEN,
    },
  );

  const head = data?.head ?? 0;
  useEffect(() => {
    if (head <= kept.number) return;
    const read = async () => {
      const { version, content } = await ask<OpenVersion>(`/api/notebooks/${id}/versions/${head}`);
      const { number, savedAt, author: savedBy, byItself } = version;
      return { number, content, savedAt, savedBy, byItself };
    };
    // The next look tries again.
    takeHead(read).catch(() => undefined);
  }, [data, head, id, kept.number, takeHead]);

  return data ?? null;
}
