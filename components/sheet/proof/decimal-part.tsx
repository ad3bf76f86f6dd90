'use client';

import { useEffect, useRef, useState } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { CopyButton } from '@/components/ui/copy-button';
import { Field } from '@/components/ui/field';
import type { Result } from '../result';
import type { Place } from '../state/uses';
import { sayDecimal } from '../say-number';
import { Part } from './part';
import { questionOfLine } from './question-of-line';

/** Most digits that a decimal can be asked in: the limit of the engine. */
const MOST_DIGITS = 10_000;

interface DecimalPartProps {
  content: NotebookContent;
  at: Place;
  result: Extract<Result, { kind: 'number' | 'angle' }>;
}

type Asked =
  | { kind: 'idle' }
  | { kind: 'waiting'; digits: number }
  | { kind: 'failed'; fault: string }
  | { kind: 'done'; text: string; digits: number; whole: boolean };

/** The decimal, to as many significant digits as one likes; the server rounds each of them correctly. */
export function DecimalPart({ content, at, result }: DecimalPartProps) {
  const [wanted, setWanted] = useState(String(result.decimal.digits));
  const [asked, setAsked] = useState<Asked>({ kind: 'idle' });
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);

  const unit = result.kind === 'number' ? (result.unit ?? '') : '°';
  const shown =
    asked.kind === 'done'
      ? asked
      : {
          text: sayDecimal(result, true),
          digits: result.decimal.digits,
          whole: result.decimal.terminates,
        };
  const count = Number(wanted);
  const fault =
    Number.isInteger(count) && count >= 1 && count <= MOST_DIGITS
      ? null
      : `Write a whole number from 1 to ${MOST_DIGITS}.`;

  const workOut = async () => {
    running.current?.abort();
    const controller = new AbortController();
    running.current = controller;
    setAsked({ kind: 'waiting', digits: count });
    try {
      const answer = await ask<{ cells: { results: Result[] }[] }>('/api/evaluate', {
        body: questionOfLine(content, at, count),
        signal: controller.signal,
      });
      const given = answer.cells.at(-1)?.results.at(-1);
      if (given?.kind === 'number' || given?.kind === 'angle') {
        const { digits, terminates } = given.decimal;
        setAsked({ kind: 'done', text: sayDecimal(given, true), digits, whole: terminates });
      } else {
        const why = given?.kind === 'error' ? given.error.message : 'This line is no number now.';
        setAsked({ kind: 'failed', fault: why });
      }
    } catch (thrown) {
      if (controller.signal.aborted) return;
      setAsked({ kind: 'failed', fault: sayFault(thrown) });
    }
  };

  return (
    <Part title="Decimal">
      <p
        className="max-h-44 overflow-y-auto font-mono text-small [overflow-wrap:anywhere]"
        tabIndex={shown.text.length > 200 ? 0 : undefined}
      >
        {shown.text}
        {unit && ` ${unit}`}
      </p>
      <p role="status" className="mt-1 text-small text-soft">
        {asked.kind === 'waiting'
          ? `Working out ${asked.digits} digits …`
          : shown.whole
            ? 'All of it: the decimal ends here.'
            : `Correctly rounded to ${shown.digits} significant digits.`}
      </p>
      <form
        noValidate
        className="mt-2 flex flex-wrap items-end gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          if (fault === null && asked.kind !== 'waiting') void workOut();
        }}
      >
        <div className="w-32">
          <Field
            label="Digits"
            inputMode="numeric"
            value={wanted}
            fault={fault}
            onChange={(event) => setWanted(event.target.value)}
          />
        </div>
        <Button type="submit" aria-disabled={asked.kind === 'waiting' || fault !== null}>
          {asked.kind === 'waiting' ? 'Working out …' : 'Work out'}
        </Button>
        <CopyButton text={shown.text} label="Copy" />
      </form>
      {asked.kind === 'failed' && (
        <p role="alert" className="mt-1 text-small text-ruddle">
          {asked.fault}
        </p>
      )}
    </Part>
  );
}
