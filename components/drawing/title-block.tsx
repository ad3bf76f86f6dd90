import type { ReactNode } from 'react';

export interface TitleField {
  label: string;
  value: ReactNode;
  /** Of twelve columns. */
  span: 2 | 3 | 4 | 5 | 6 | 8 | 12;
  strong?: boolean;
}

const SPANS = {
  2: 'sm:col-span-2 col-span-3',
  3: 'sm:col-span-3 col-span-6',
  4: 'sm:col-span-4 col-span-12',
  5: 'sm:col-span-5 col-span-12',
  6: 'sm:col-span-6 col-span-12',
  8: 'sm:col-span-8 col-span-12',
  12: 'col-span-12',
} as const;

/** The title block in the lower right corner of the sheet; fields after ISO 7200. */
export function TitleBlock({ fields }: { fields: readonly TitleField[] }) {
  return (
    <footer
      aria-label="Title block"
      className="ml-auto w-full max-w-3xl border-t-2 border-ink bg-sheet sm:border-l-2 break-inside-avoid"
    >
      <dl className="-mb-px -mr-px grid grid-cols-12 overflow-hidden">
        {fields.map(({ label, value, span, strong }) => (
          <div
            key={label}
            className={`min-w-0 border-b border-r border-rule px-2.5 pb-1.5 pt-1 ${SPANS[span]}`}
          >
            <dt className="text-tag text-soft">{label}</dt>
            <dd
              className={`[overflow-wrap:anywhere] ${strong ? 'font-serif text-figure font-semibold' : 'text-small'}`}
            >
              {value}
            </dd>
          </div>
        ))}
      </dl>
    </footer>
  );
}
