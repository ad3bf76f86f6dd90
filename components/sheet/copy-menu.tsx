'use client';

import { useState } from 'react';
import { Disclosure, DISCLOSURE_ROW } from '@/components/ui/disclosure';
import { copyForms, type CopyForm } from './copy-forms';
import type { Result } from './result';

/** Copies a value as exact text, TeX, MathML, decimal, cut size or JSON; a list also as a column. */
export function CopyMenu({ result }: { result: Result }) {
  const [said, setSaid] = useState('');
  const forms = copyForms(result);
  if (forms.length === 0) return null;
  const name = result.mark ?? result.source.trim();

  const copy = async ({ label, text }: CopyForm) => {
    try {
      await navigator.clipboard.writeText(typeof text === 'string' ? text : await text());
      setSaid(`${label} copied`);
    } catch {
      setSaid('The browser refused to copy');
    }
  };

  return (
    <div data-copy className="flex items-center gap-2 text-small">
      <Disclosure
        label="Copy"
        name={`Copy the value of ${name}`}
        className="min-h-7 px-1 text-snapline underline-offset-4 hover:underline"
      >
        {forms.map((form) => (
          <button
            key={form.label}
            type="button"
            className={DISCLOSURE_ROW}
            onClick={() => void copy(form)}
          >
            <span>{form.label}</span>
            {typeof form.text === 'string' && form.label !== 'JSON' && (
              <span className="max-w-32 truncate font-mono text-soft" aria-hidden="true">
                {form.text}
              </span>
            )}
          </button>
        ))}
      </Disclosure>
      <span role="status" className="text-soft">
        {said}
      </span>
    </div>
  );
}
