'use client';

import { useEffect, useRef, useState, type ReactNode } from 'react';
import type { Result } from '../result';
import type { EditorHandle, EditorOptions, PlacedFault } from './make-editor';

interface SourceEditorProps extends Pick<EditorOptions, 'source' | 'kind' | 'label' | 'nonce' | 'onWrite' | 'onLeave'> {
  results: readonly Result[];
  /** What stands here until the editor has been loaded. */
  meanwhile: ReactNode;
}

/** What the editor underlines for one line: its error, or readings that may surprise. */
export function placedFaults(result: Result): PlacedFault[] {
  const { line } = result;
  if (result.kind === 'error') {
    const { from, to, message } = result.error;
    return [{ line, from, to, message, severity: 'error' }];
  }
  return result.notices.map((notice) => ({ line, ...notice, severity: 'warning' }));
}

/** Fetches the editor while the browser is idle, so that the first cell opens at once. */
export function preloadEditor() {
  void import('./make-editor');
}

/** CodeMirror, opened where the source stood; what it is told changes without making it anew. */
export function SourceEditor({ results, meanwhile, ...options }: SourceEditorProps) {
  const parent = useRef<HTMLDivElement>(null);
  const handle = useRef<EditorHandle | null>(null);
  const latest = useRef(options);
  /** Texts typed here that have not come back as `source` yet; an answer to one is no news. */
  const typed = useRef<string[]>([]);
  const [ready, setReady] = useState(false);
  const { source } = options;

  useEffect(() => {
    latest.current = options;
  });

  useEffect(() => {
    let gone = false;
    void import('./make-editor').then(({ makeEditor }) => {
      if (gone || !parent.current) return;
      handle.current = makeEditor({
        ...latest.current,
        parent: parent.current,
        onWrite: (text) => {
          typed.current.push(text);
          latest.current.onWrite(text);
        },
        onLeave: (to) => latest.current.onLeave(to),
      });
      handle.current.focus();
      setReady(true);
    });
    return () => {
      gone = true;
      handle.current?.destroy();
      handle.current = null;
    };
  }, []);

  useEffect(() => {
    if (!ready) return;
    const at = typed.current.indexOf(source);
    typed.current = at < 0 ? [] : typed.current.slice(at + 1);
    if (at < 0) handle.current?.setSource(source);
  }, [ready, source]);

  useEffect(() => {
    if (!ready) return;
    handle.current?.setFaults(results.flatMap(placedFaults));
  }, [ready, results]);

  return (
    <div className="border-l-2 border-snapline pl-2.5">
      <div ref={parent} />
      {!ready && meanwhile}
    </div>
  );
}
