'use client';

import { useState } from 'react';
import { Disclosure, DISCLOSURE_ROW } from '@/components/ui/disclosure';
import type { Result } from './result';

/** The forms in which a value leaves the sheet. */
export function copyForms(result: Result): { label: string; text: string }[] {
  switch (result.kind) {
    case 'number': {
      const { re, im } = result.decimal;
      const decimal =
        im === null ? re : `${re} ${im.startsWith('-') ? '-' : '+'} ${im.replace(/^-/, '')} i`;
      const forms = [
        { label: 'Exact text', text: result.exact.text },
        { label: 'TeX', text: result.exact.tex },
        { label: 'Decimal', text: decimal },
      ];
      return result.cut ? [...forms, { label: 'Cut size', text: result.cut.value }] : forms;
    }
    case 'angle':
      return [
        { label: 'Exact text', text: result.exact.text },
        { label: 'TeX', text: result.exact.tex },
        { label: 'Degrees', text: result.decimal.re },
      ];
    case 'point':
    case 'line':
    case 'circle':
      return [
        { label: 'Exact text', text: result.exact.text },
        { label: 'TeX', text: result.exact.tex },
        ...figureForms(result),
      ];
    case 'list':
      return [
        { label: 'Exact text', text: result.exact.text },
        { label: 'TeX', text: result.exact.tex },
      ];
    default:
      return [];
  }
}

/** Coordinates in decimals, and as cut: x and y with a tab between, as a table takes them. */
function figureForms(result: Extract<Result, { kind: 'point' | 'line' | 'circle' }>) {
  if (result.kind !== 'point') return [];
  const { x, y } = result.coordinates;
  const decimal = { label: 'x and y', text: `${x.decimal.re}\t${y.decimal.re}` };
  if (!x.cut || !y.cut) return [decimal];
  return [decimal, { label: 'x and y, cut', text: `${x.cut.value}\t${y.cut.value}` }];
}

/** Copies a value as exact text, TeX or decimal. */
export function CopyMenu({ result }: { result: Result }) {
  const [said, setSaid] = useState('');
  const forms = copyForms(result);
  if (forms.length === 0) return null;
  const name = result.mark ?? result.source.trim();

  const copy = (label: string, text: string) =>
    navigator.clipboard.writeText(text).then(
      () => setSaid(`${label} copied`),
      () => setSaid('The browser refused to copy'),
    );

  return (
    <div data-copy className="flex items-center gap-2 text-small">
      <Disclosure
        label="Copy"
        name={`Copy the value of ${name}`}
        className="min-h-7 px-1 text-snapline underline-offset-4 hover:underline"
      >
        {forms.map(({ label, text }) => (
          <button
            key={label}
            type="button"
            className={DISCLOSURE_ROW}
            onClick={() => void copy(label, text)}
          >
            <span>{label}</span>
            <span className="max-w-32 truncate font-mono text-soft" aria-hidden="true">
              {text}
            </span>
          </button>
        ))}
      </Disclosure>
      <span role="status" className="text-soft">
        {said}
      </span>
    </div>
  );
}
