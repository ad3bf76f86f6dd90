'use client';

import { useEffect, useRef, useState } from 'react';
import type { EditorHandle } from '@/components/sheet/editor/make-editor';
import { knownMarks } from '@/components/sheet/editor/names';
import { placedFaults } from '@/components/sheet/editor/source-editor';
import type { ShownLine } from '@/components/sheet/state/shown';
import { TRIAL_LIMITS } from '@/lib/notebooks/trial-limits';

interface LiveSourceProps {
  source: string;
  lines: readonly ShownLine[];
  onWrite: (source: string) => void;
}

const LABEL = 'Lines to work out';

/** Where the line counted from 1 begins in the whole text. */
function startOf(source: string, line: number): number {
  return source
    .split('\n')
    .slice(0, line - 1)
    .reduce((sum, text) => sum + text.length + 1, 0);
}

/** The source of the live cell: a plain field in the page as it comes, the sheet's own editor once that is loaded. */
export function LiveSource({ source, lines, onWrite }: LiveSourceProps) {
  const parent = useRef<HTMLDivElement>(null);
  const plain = useRef<HTMLTextAreaElement>(null);
  const handle = useRef<EditorHandle | null>(null);
  const latest = useRef({ source, lines, onWrite });
  const [ready, setReady] = useState(false);

  useEffect(() => {
    latest.current = { source, lines, onWrite };
  });

  useEffect(() => {
    let gone = false;
    void import('@/components/sheet/editor/make-editor').then(({ makeEditor }) => {
      if (gone || !parent.current) return;
      const field = plain.current;
      const inHand = document.activeElement === field;
      const column = field?.selectionStart ?? latest.current.source.length;
      const made = makeEditor({
        parent: parent.current,
        source: latest.current.source,
        kind: 'dimension',
        label: LABEL,
        column,
        onWrite: (text) => latest.current.onWrite(text),
        onLeave: () => false,
        names: {
          marks: () => knownMarks([{ id: LABEL }], new Map([[LABEL, latest.current.lines]])),
          goTo: () => false,
          rename: () => false,
        },
      });
      handle.current = made;
      setReady(true);
      if (inHand) made.focus(column);
    });
    return () => {
      gone = true;
      handle.current?.destroy();
      handle.current = null;
    };
  }, []);

  useEffect(() => {
    handle.current?.setSource(source);
  }, [source, ready]);

  useEffect(() => {
    handle.current?.setFaults(
      lines.flatMap(({ result }) => {
        const start = startOf(latest.current.source, result.line);
        return placedFaults(result).map((fault) => ({
          ...fault,
          from: fault.from + start,
          to: fault.to + start,
        }));
      }),
    );
  }, [lines, ready]);

  return (
    <>
      <div ref={parent} className={ready ? '' : 'hidden'} />
      {!ready && (
        <textarea
          ref={plain}
          name="lines"
          aria-label={LABEL}
          value={source}
          onChange={(event) => onWrite(event.target.value)}
          rows={Math.min(TRIAL_LIMITS.lines, source.split('\n').length)}
          maxLength={TRIAL_LIMITS.length}
          spellCheck={false}
          autoCapitalize="off"
          autoComplete="off"
          className="block w-full resize-none bg-transparent font-mono text-source"
        />
      )}
    </>
  );
}
