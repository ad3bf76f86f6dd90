'use client';

import Link from 'next/link';
import { EntryLine } from '@/components/sheet/entry-line';
import { sayResult } from '@/components/sheet/wording';
import { LiveSource } from './live-source';
import { SAMPLES } from './samples';
import type { Trial } from './tried';
import { useTrial } from './use-trial';

/** One cell that anybody may write into: its lines above, the entries they make on the sheet below. */
export function LiveCell({ first }: { first: Trial }) {
  const { source, setSource, lines, fault, settled } = useTrial(first);
  return (
    <div className="px-2 pb-5 pt-3 sm:px-3">
      <form
        action="/"
        className="border border-snapline bg-hand px-3 pb-2 pt-1.5 has-[.cm-content:focus]:outline-2 has-[.cm-content:focus]:outline-offset-2 has-[.cm-content:focus]:outline-snapline"
      >
        <div className="flex items-baseline justify-between gap-3 text-small text-soft">
          <span aria-hidden="true">Write here, a line for each mark</span>
          <span role="status">{settled ? '' : 'working out…'}</span>
        </div>
        <div className="mt-1 -ml-1 border-l-2 border-snapline pl-2.5">
          <LiveSource source={source} lines={lines} onWrite={setSource} />
        </div>
        <noscript>
          <button
            type="submit"
            className="mt-2 border border-rule px-3 py-1 text-small font-medium"
          >
            Work it out
          </button>
        </noscript>
      </form>
      <ul className="mt-2 flex flex-wrap gap-x-3 gap-y-1 text-small" aria-label="Samples to put in">
        {SAMPLES.map(({ title, lines: sample }) => (
          <li key={title}>
            <Link
              href={`/?lines=${encodeURIComponent(sample)}`}
              prefetch={false}
              scroll={false}
              onClick={(event) => {
                event.preventDefault();
                setSource(sample);
              }}
              aria-current={source === sample ? 'true' : undefined}
              className="inline-block py-0.5 text-snapline underline decoration-hairline underline-offset-4 hover:decoration-current aria-current:text-ink aria-current:decoration-ruddle aria-current:decoration-2"
            >
              {title}
            </Link>
          </li>
        ))}
      </ul>
      {fault !== null && (
        <p
          role="alert"
          className="mt-3 border border-l-4 border-ochre bg-ochre-wash px-3 py-2 text-small"
        >
          {fault}
        </p>
      )}
      <div className="mt-5 space-y-5" aria-label="What they come to" role="group">
        {lines.map((line) => (
          <EntryLine key={line.result.line} line={line} greyed={fault !== null} />
        ))}
        {lines.length === 0 && fault === null && (
          <p className="py-6 text-center font-serif text-note italic text-soft">
            What you write stands here as on a sheet.
          </p>
        )}
      </div>
      <p role="status" aria-live="polite" className="sr-only">
        {settled && source !== first.source
          ? lines.map(({ result }) => sayResult(result)).join(' ')
          : ''}
      </p>
    </div>
  );
}
