'use client';

import type { EditorView } from '@codemirror/view';
import { useEffect, useRef, useState } from 'react';
import { CopyButton } from '@/components/ui/copy-button';

interface CodeViewProps {
  text: string;
  label: string;
}

/** A stretch of JavaScript with its parts coloured; plain text until the editor has been loaded. */
export function CodeView({ text, label }: CodeViewProps) {
  const parent = useRef<HTMLDivElement>(null);
  const [ready, setReady] = useState(false);

  useEffect(() => {
    let view: EditorView | null = null;
    let gone = false;
    void import('./make-view').then(({ makeView }) => {
      if (gone || !parent.current) return;
      view = makeView(parent.current, text, label);
      setReady(true);
    });
    return () => {
      gone = true;
      view?.destroy();
    };
  }, [text, label]);

  return (
    <div className="space-y-2">
      <div className="border border-rule bg-sheet has-[.cm-content:focus]:outline-2 has-[.cm-content:focus]:outline-offset-2 has-[.cm-content:focus]:outline-snapline">
        <div ref={parent} />
        {!ready && (
          <pre tabIndex={0} className="overflow-x-auto p-3.5 font-mono text-small">
            {text}
          </pre>
        )}
      </div>
      <CopyButton text={text} label="Copy the example" />
    </div>
  );
}
