'use client';

import { useEffect, useState } from 'react';
import useSWR from 'swr';
import type { NotebookContent } from '@/lib/notebooks/content';
import { ask, sayFault } from '@/components/ui/ask';
import { evaluationRequest } from './evaluation-request';
import { digestsOf, mergeAnswer } from './merge-answer';
import { foldAnswer, type CellAnswer, type Shown } from './shown';

export interface Evaluation {
  shown: Shown;
  /** `pending` is the ordinary moment after a keystroke; `slow` is worth a word. */
  state: 'settled' | 'pending' | 'slow' | 'failed';
  fault: string | null;
}

/** Milliseconds without a keystroke before the server is asked. */
const SETTLE = 250;
const SLOW = 1500;

function useSettled(text: string): string {
  const [settled, setSettled] = useState(text);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(text), SETTLE);
    return () => clearTimeout(timer);
  }, [text]);
  return settled;
}

interface Answer {
  cells: CellAnswer[];
}

/** Asks for a text and says what is had already, so that of a long notebook only what is different is sent. */
async function fetchAnswer(
  path: string,
  text: string,
  had: readonly CellAnswer[],
): Promise<Answer> {
  const body = JSON.parse(text) as ReturnType<typeof evaluationRequest>;
  if (body.cells.length === 0) return { cells: [] };
  const sent = await ask<Answer>(path, { body: { ...body, have: digestsOf(had) } });
  return { cells: mergeAnswer(body.cells, had, sent.cells) };
}

/**
 * The notebook evaluated on the server as one types. The answer to an older text never shows: it
 * belongs to another key. Until a newer answer comes, the last one stays.
 */
export function useEvaluation(content: NotebookContent, initial: CellAnswer[] | null): Evaluation {
  // As text: equal text, equal answer.
  const text = JSON.stringify(evaluationRequest(content));
  const settled = useSettled(text);
  const [first] = useState(settled);
  const [slow, setSlow] = useState(false);
  const [seen, setSeen] = useState<Answer | undefined>(undefined);
  const had = seen?.cells ?? initial ?? [];
  const { data, error, isLoading, isValidating } = useSWR<Answer, unknown, [string, string]>(
    ['/api/evaluate', settled],
    ([path, asked]) => fetchAnswer(path, asked, had),
    {
      ...(initial !== null && settled === first ? { fallbackData: { cells: initial } } : {}),
      keepPreviousData: true,
      revalidateIfStale: false,
      revalidateOnMount: initial === null,
      revalidateOnFocus: false,
      dedupingInterval: 60_000,
      loadingTimeout: SLOW,
      onLoadingSlow: () => setSlow(true),
      onSuccess: () => setSlow(false),
      onError: () => setSlow(false),
    },
  );

  const [shown, setShown] = useState<Shown>(() => foldAnswer(new Map(), initial ?? []));
  if (data !== undefined && data !== seen) {
    setSeen(data);
    setShown(foldAnswer(shown, data.cells));
  }

  if (error !== undefined && !isValidating) {
    return { shown, state: 'failed', fault: sayFault(error) };
  }
  if (isLoading || text !== settled) {
    return { shown, state: slow ? 'slow' : 'pending', fault: null };
  }
  return { shown, state: 'settled', fault: null };
}
