import type { ReactNode } from 'react';

interface ScrollTableProps {
  caption: string;
  heads: readonly string[];
  children: ReactNode;
}

/**
 * A table that scrolls sideways in its own frame, by keyboard too, so that the page never has to. On paper it breaks
 * between rows, and its head stands on every sheet.
 */
export function ScrollTable({ caption, heads, children }: ScrollTableProps) {
  return (
    <div
      role="group"
      aria-label={caption}
      tabIndex={0}
      className="scroll-hint overflow-x-auto border border-rule print:overflow-visible print:border-0 print:bg-none"
    >
      <table className="w-full border-collapse text-small">
        <caption className="sr-only">{caption}</caption>
        <thead className="border-b-2 border-ink">
          <tr>
            {heads.map((head) => (
              <th
                key={head}
                scope="col"
                className="whitespace-nowrap px-3 py-1.5 text-left font-semibold print:whitespace-normal print:px-1.5"
              >
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>{children}</tbody>
      </table>
    </div>
  );
}

export const ROW = 'break-inside-avoid border-b border-hairline last:border-b-0';
export const CELL =
  'whitespace-nowrap px-3 py-1.5 text-left align-baseline font-normal print:whitespace-normal print:px-1.5';
export const FIGURES = `${CELL} font-mono tabular-nums`;
