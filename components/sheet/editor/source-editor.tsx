'use client';

import { useEffect, useLayoutEffect, useRef, useState, type ReactNode } from 'react';
import { flushSync } from 'react-dom';
import type { Result } from '../result';
import type { EditorHandle, EditorOptions, PlacedFault } from './make-editor';

type Loaded = typeof import('./make-editor');

interface SourceEditorProps extends Pick<
  EditorOptions,
  'source' | 'kind' | 'label' | 'column' | 'names' | 'onWrite' | 'onLeave' | 'onJoin'
> {
  results: readonly Result[];
  /** What stands here until the editor has been loaded. */
  meanwhile: ReactNode;
}

/** Once loaded, an editor opens at once: no keystroke falls between one line and the next. */
let loaded: Loaded | null = null;

/** What the editor underlines for one line: its error, or readings that may surprise. */
export function placedFaults(result: Result): PlacedFault[] {
  if (result.kind === 'error') {
    const { from, to, message } = result.error;
    return [{ from, to, message, severity: 'error' }];
  }
  return result.notices.map((notice) => ({ ...notice, severity: 'warning' }));
}

async function loadEditor(): Promise<Loaded> {
  loaded ??= await import('./make-editor');
  return loaded;
}

/** Fetches the editor while the browser is idle, so that the first cell opens at once. */
export function preloadEditor() {
  void loadEditor();
}

/** CodeMirror, opened where the source stood; what it is told changes without making it anew. */
export function SourceEditor({ results, meanwhile, ...options }: SourceEditorProps) {
  const parent = useRef<HTMLDivElement>(null);
  const handle = useRef<EditorHandle | null>(null);
  const latest = useRef(options);
  /** Texts typed here that have not come back as `source` yet; an answer to one is no news. */
  const typed = useRef<string[]>([]);
  const [ready, setReady] = useState(loaded !== null);
  const { source, column } = options;

  useLayoutEffect(() => {
    latest.current = options;
  });

  useLayoutEffect(() => {
    let gone = false;
    const open = ({ makeEditor }: Loaded) => {
      if (gone || !parent.current) return;
      handle.current = makeEditor({
        ...latest.current,
        parent: parent.current,
        onWrite: (text, cursor) => {
          typed.current.push(text);
          // At once: the next keystroke, or an answer that redraws the sheet, must find this one.
          flushSync(() => latest.current.onWrite(text, cursor));
        },
        onLeave: (to, at) => latest.current.onLeave(to, at),
        onJoin: (side) => latest.current.onJoin?.(side) ?? false,
      });
      handle.current.focus(latest.current.column);
    };
    if (loaded) open(loaded);
    else {
      void loadEditor().then((module) => {
        open(module);
        setReady(true);
      });
    }
    return () => {
      gone = true;
      handle.current?.destroy();
      handle.current = null;
    };
  }, []);

  useLayoutEffect(() => {
    if (!ready) return;
    const at = typed.current.indexOf(source);
    typed.current = at < 0 ? [] : typed.current.slice(at + 1);
    if (at < 0) handle.current?.setSource(source);
  }, [ready, source]);

  useLayoutEffect(() => {
    if (ready) handle.current?.focus(column);
  }, [ready, column]);

  useEffect(() => {
    if (!ready) return;
    handle.current?.setFaults(results.flatMap(placedFaults));
  }, [ready, results]);

  return (
    <div className="-ml-3 border-l-2 border-snapline pl-2.5">
      <div ref={parent} />
      {!ready && meanwhile}
    </div>
  );
}
