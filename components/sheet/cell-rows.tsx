import type { ReactNode } from 'react';
import { EntryLine } from './entry-line';
import { errorOf, linesOf, SourceLine } from './source-text';
import type { ShownLine } from './state/shown';

interface CellRowsProps {
  source: string;
  lines: readonly ShownLine[];
  greyed?: boolean;
  /** The line in hand, from 0: its figures are shown in full. */
  inHand?: number | null;
  /** How a line of source is shown; by default it just stands there. */
  renderSource?: (index: number, standing: ReactNode) => ReactNode;
  renderActions?: (line: ShownLine) => ReactNode;
}

/** The lines of a dimension cell one under another: those with a value as entries, others as text. */
export function CellRows(props: CellRowsProps) {
  const { source, lines, greyed = false, inHand = null, renderSource, renderActions } = props;
  const byLine = new Map(lines.map((line) => [line.result.line, line]));
  return (
    <div className="space-y-6">
      {linesOf(source).map((text, index) => {
        const line = byLine.get(index + 1) ?? null;
        const standing = <SourceLine text={text} error={errorOf(line?.result)} />;
        const shown = renderSource ? renderSource(index, standing) : <div>{standing}</div>;
        if (!line && text.trim() === '' && !renderSource) return null;
        return (
          <EntryLine
            key={index}
            line={line}
            greyed={greyed}
            full={inHand === index}
            source={shown}
            actions={line && renderActions?.(line)}
          />
        );
      })}
    </div>
  );
}
