'use client';

import { useEffect, useRef, useState } from 'react';
import { ask, Refusal, sayFault } from '@/components/ui/ask';
import type { Result } from '@/components/sheet/result';
import { foldAnswer, type Shown, type ShownLine } from '@/components/sheet/state/shown';
import type { Trial } from './tried';

/** Milliseconds without a keystroke before the server is asked. */
const SETTLE = 300;
/** Milliseconds before the server is asked once more when other visitors were before us. */
const AGAIN = 1200;
const CELL = 'try';

const fold = (shown: Shown, results: Result[]) => foldAnswer(shown, [{ id: CELL, results }]);
const isBlank = (source: string) => source.split('\n').every((line) => /^\s*(#|$)/.test(line));

interface State {
  /** The lines the figures belong to. */
  of: string;
  shown: Shown;
  fault: string | null;
}

/** The live cell: what is written in it and what the server last said about it. */
export function useTrial(first: Trial) {
  const [source, setSource] = useState(first.source);
  const [state, setState] = useState<State>(() => ({
    of: first.source,
    shown: fold(new Map(), first.results),
    fault: first.fault,
  }));
  const asked = useRef(first.source);

  useEffect(() => {
    if (source === asked.current) return;
    const stop = new AbortController();
    let timer = setTimeout(() => void attempt(2), SETTLE);
    const attempt = async (left: number): Promise<void> => {
      asked.current = source;
      try {
        const results = isBlank(source)
          ? []
          : (
              await ask<{ results: Result[] }>('/api/try', {
                body: { source },
                signal: stop.signal,
              })
            ).results;
        setState(({ shown }) => ({ of: source, shown: fold(shown, results), fault: null }));
      } catch (fault) {
        if (stop.signal.aborted) return;
        if (left > 1 && fault instanceof Refusal && fault.code === 'busy') {
          timer = setTimeout(() => void attempt(left - 1), AGAIN);
          return;
        }
        setState(({ shown }) => ({ of: source, shown, fault: sayFault(fault) }));
      }
    };
    return () => {
      clearTimeout(timer);
      stop.abort();
      asked.current = '';
    };
  }, [source]);

  const lines: readonly ShownLine[] = state.shown.get(CELL) ?? [];
  return { source, setSource, lines, fault: state.fault, settled: state.of === source };
}
