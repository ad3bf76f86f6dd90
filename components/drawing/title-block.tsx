import type { ReactNode } from 'react';

export interface TitleField {
  label: string;
  value: ReactNode;
  /** Of twelve columns. */
  span: 2 | 3 | 4 | 5 | 6 | 8 | 12;
  strong?: boolean;
}

/** How wide a compartment is at least; those of a row share what is left over, so that no row has a hole. */
const SPANS = {
  2: 'sm:basis-1/6 basis-1/4',
  3: 'sm:basis-1/4 basis-1/2',
  4: 'sm:basis-1/3 basis-1/2',
  5: 'sm:basis-5/12 basis-full',
  6: 'sm:basis-1/2 basis-full',
  8: 'sm:basis-2/3 basis-full',
  12: 'basis-full',
} as const;

/** The title block in the lower right corner of the sheet; fields after ISO 7200. */
export function TitleBlock({ fields }: { fields: readonly TitleField[] }) {
  return (
    <footer
      aria-label="Title block"
      className="ml-auto w-full max-w-3xl border-t-2 border-ink bg-sheet sm:border-l-2 break-inside-avoid"
    >
      <dl className="-mb-px -mr-px flex flex-wrap overflow-hidden">
        {fields.map(({ label, value, span, strong }) => (
          <div
            key={label}
            className={`min-w-0 grow border-b border-r border-rule px-2.5 pb-1.5 pt-1 print:pb-0.5 print:pt-0 ${SPANS[span]}`}
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
