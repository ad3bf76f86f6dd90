import type { ReactNode } from 'react';
import { Tex } from '@/components/ui/tex';
import type { Result } from '@/components/sheet/result';
import { valueTex } from '@/components/sheet/value-tex';
import type { NotebookCell } from '@/lib/notebooks/content';
import type { ComparedCell, ComparedLine } from './compared';
import { MarkedSource } from './marked-source';
import { cutFigure, exactFigure } from './short-figure';

interface ComparisonProps {
  cells: readonly ComparedCell[];
  from: number;
  to: number;
}

const STATES: Record<ComparedCell['state'], string> = {
  same: 'the same',
  changed: 'changed',
  added: 'added',
  gone: 'taken out',
  follows: 'written alike; its values follow',
  moved: 'moved, otherwise the same',
};

const KINDS: Record<NotebookCell['kind'], string> = {
  dimension: 'Dimension cell',
  note: 'Note',
  section: 'Section',
};

/** Two versions side by side, cell by cell; on a narrow screen one under the other. */
export function Comparison({ cells, from, to }: ComparisonProps) {
  return (
    <div className="border border-rule bg-sheet">
      <div
        aria-hidden
        className="sticky top-0 z-10 hidden border-b-2 border-ink bg-sheet md:grid md:grid-cols-2"
      >
        <p className="px-3 py-2 text-small font-semibold">Version {from}</p>
        <p className="border-l border-rule px-3 py-2 text-small font-semibold">Version {to}</p>
      </div>
      <ol>
        {cells.map((cell) => (
          <Row key={cell.id} cell={cell} from={from} to={to} />
        ))}
      </ol>
    </div>
  );
}

interface RowProps {
  cell: ComparedCell;
  from: number;
  to: number;
}

function Row({ cell, from, to }: RowProps) {
  const { before, after, state, lines } = cell;
  const kind = KINDS[(after ?? before)?.kind ?? 'dimension'];
  return (
    <li className="border-b border-hairline last:border-b-0">
      <p className="bg-limestone px-3 py-1 text-small text-soft">
        {kind}, {STATES[state]}
      </p>
      <div className="md:grid md:grid-cols-2">
        <Side name={`Version ${from}`}>
          {before === null ? (
            <Missing />
          ) : (
            <>
              <Text cell={before} other={after} sign="gone" />
              <Figures lines={lines} side="before" />
            </>
          )}
        </Side>
        <Side name={`Version ${to}`} second>
          {after === null ? (
            <Missing />
          ) : (
            <>
              <Text cell={after} other={before} sign="come" />
              <Figures lines={lines} side="after" />
            </>
          )}
        </Side>
      </div>
    </li>
  );
}

function Side({ name, second, children }: { name: string; second?: boolean; children: ReactNode }) {
  return (
    <section
      aria-label={name}
      className={`min-w-0 px-3 py-2.5 ${second ? 'border-rule max-md:border-t max-md:border-dashed md:border-l' : ''}`}
    >
      <p className="text-tag text-soft md:hidden">{name}</p>
      {children}
    </section>
  );
}

const Missing = () => <p className="text-small italic text-soft">not on the sheet</p>;

interface TextProps {
  cell: NotebookCell;
  other: NotebookCell | null;
  sign: 'gone' | 'come';
}

function Text({ cell, other, sign }: TextProps) {
  const own = Object.entries(cell.settings ?? {});
  const others: Record<string, unknown> = other?.settings ?? {};
  return (
    <>
      <MarkedSource source={cell.source} other={other?.source ?? cell.source} sign={sign} />
      {own.length > 0 && (
        <p className="text-small text-soft">
          {own.map(([name, value], index) => (
            <span key={name}>
              {index > 0 && ', '}
              <span className={others[name] === value ? '' : 'font-semibold text-ink'}>
                {`${name} ${value ?? 'none'}`}
              </span>
            </span>
          ))}
        </p>
      )}
    </>
  );
}

function Figures({ lines, side }: { lines: readonly ComparedLine[]; side: 'before' | 'after' }) {
  const shown = lines.filter((line) => line[side] !== null);
  if (shown.length === 0) return null;
  return (
    <ul className="mt-2 space-y-2 border-t border-hairline pt-2">
      {shown.map((line, index) => {
        const result = line[side];
        if (result === null) return null;
        return (
          <li
            key={index}
            className={`min-w-0 border-l-4 pl-2.5 ${line.differs ? 'border-ochre' : 'border-transparent'}`}
          >
            <Figure result={result} word={line.differs ? wordFor(line, side) : null} />
            {side === 'after' && line.difference !== null && (
              <p className="text-small font-semibold">{line.difference}</p>
            )}
          </li>
        );
      })}
    </ul>
  );
}

/** What a figure is to the other version: a line that is only in one of the two has nothing to differ from. */
function wordFor({ before, after }: ComparedLine, side: 'before' | 'after'): string {
  if (before !== null && after !== null) return 'differs';
  return side === 'after' ? 'new' : 'gone';
}

function Figure({ result, word }: { result: Result; word: string | null }) {
  const tex = result.kind === 'error' || result.kind === 'list' ? null : valueTex(result);
  const cut = cutFigure(result);
  return (
    <>
      <div className="flex flex-wrap items-baseline gap-x-2">
        {result.mark !== null && <b className="font-serif font-semibold">{result.mark}</b>}
        {tex === null ? (
          <span className="text-small [overflow-wrap:anywhere]">{exactFigure(result)}</span>
        ) : (
          <span className="min-w-0 max-w-full overflow-x-auto overflow-y-hidden py-1" tabIndex={-1}>
            <Tex tex={tex} />
          </span>
        )}
        {word !== null && <span className="text-small text-ochre">{word}</span>}
      </div>
      {result.kind === 'truth' && <p className="text-small">{exactFigure(result)}</p>}
      {cut !== null && (
        <p className="text-small text-soft">
          <span className="font-mono text-ink">{cut.figure}</span> {cut.below}
        </p>
      )}
    </>
  );
}
