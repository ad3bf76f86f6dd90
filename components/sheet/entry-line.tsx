import type { ReactNode } from 'react';
import { Balloon } from '@/components/drawing/balloon';
import { Compartments } from '@/components/drawing/compartments';
import { DimensionLine } from '@/components/drawing/dimension-line';
import { Sentence } from '@/components/ui/sentence';
import { Tex } from '@/components/ui/tex';
import { ListTable } from './lists/list-table';
import { ListValue } from './lists/list-value';
import type { Result } from './result';
import type { ShownLine } from './state/shown';
import { isLongList, stepTex, valueTex } from './value-tex';
import { sayUnit } from './say-number';
import { compartmentsOf, sayDimension } from './wording';

interface EntryLineProps {
  /** Null for a line without a result: blank, a remark, or not worked out yet. */
  line: ShownLine | null;
  /** An older answer is being shown while a newer one is awaited or cannot be had. */
  greyed?: boolean;
  /** In hand: every figure is shown. */
  full?: boolean;
  /** The source, where a cell of one line shows it between value and compartments. */
  source?: ReactNode;
  /** What can be done with the value (copying); none on a sheet that is only read. */
  actions?: ReactNode;
}

const signOf = ({ mark, kind }: Result) => mark ?? (kind === 'truth' ? '=' : null);

/** The value of one line, typeset; a line that never parsed stands as its text. */
function Value({ result }: { result: Result }) {
  if (result.kind === 'list') return <ListValue list={result} />;
  const tex = valueTex(result);
  if (tex === null) return <span className="font-mono text-source">{result.source.trim()}</span>;
  return <Tex tex={tex} display />;
}

/** Whether the exact value itself stands large, and not the line as it was written. */
const showsExact = (result: Result) =>
  'exact' in result && !(result.kind === 'list' && isLongList(result));

const lengthOf = (result: Result) =>
  'exact' in result && showsExact(result) ? result.exact.text.length : result.source.length;

const mayScroll = (result: Result) => lengthOf(result) > 24;

/** On paper a drawn dimension stands beside a value only where both have room. */
const isWide = (result: Result) => result.kind === 'list' || lengthOf(result) >= 40;

/** Typeset in one line it would run off an A4 sheet, where nothing can be scrolled. */
const isTooWideForPaper = (result: Result) =>
  'exact' in result &&
  result.kind !== 'list' &&
  lengthOf(result) > 130 &&
  !(result.kind === 'number' && result.exact.staged);

/** The exact value as text, which breaks at any place: what paper shows of a value too wide for it. */
function OnPaper({ result }: { result: Result }) {
  if (!('exact' in result)) return null;
  const unit = result.kind === 'number' && result.unit !== null ? ` ${sayUnit(result.unit)}` : '';
  return (
    <p className="hidden font-mono text-small [overflow-wrap:anywhere] print:block">
      {unit === '' ? result.exact.text : `(${result.exact.text})${unit}`}
    </p>
  );
}

/** Long values are set smaller, so that most are seen whole beside their drawn dimension. */
function sizeOf(result: Result): string {
  const length = lengthOf(result);
  if (length < 48) return 'text-value';
  return length < 90 ? 'text-figure print:text-base' : 'text-base print:text-small';
}

/** More steps than this stand folded until they are asked for. */
const MANY_STEPS = 4;
/** Values of a longer text than this can be read whole beneath, broken over lines. */
const WIDE = 90;

const MORE = 'w-fit text-small text-snapline underline-offset-4 hover:underline print:hidden';

/** The named quadratics of a value too wide to read in one piece, one under another. */
function Steps({ result }: { result: Result }) {
  if (result.kind !== 'number' || !result.exact.staged || !result.tower) return null;
  const { tower } = result;
  return (
    <details open={tower.length <= MANY_STEPS} className="mt-1 text-base">
      <summary className={MORE}>{`${tower.length} steps, lowest first`}</summary>
      <ol className="mt-1 space-y-1 border-l border-hairline pl-3" aria-label="Steps, lowest first">
        {tower.map((step) => (
          <li key={step.name} className="py-0.5 text-base">
            <Tex tex={stepTex(step)} />
          </li>
        ))}
      </ol>
    </details>
  );
}

/** A value wider than its row, as text that breaks over lines. */
function WholeText({ result }: { result: Result }) {
  // The items of a list are read whole in its table.
  if (!('exact' in result) || result.kind === 'list') return null;
  if (result.exact.text.length <= WIDE) return null;
  return (
    <details>
      <summary className={MORE}>Read it whole</summary>
      <code className="mt-1 block max-h-72 overflow-y-auto border-l border-hairline pl-3 font-mono text-small [overflow-wrap:anywhere]">
        {result.exact.text}
      </code>
    </details>
  );
}

/** One line of a dimension cell on the sheet: balloon, exact value, drawn dimension, compartments. */
export function EntryLine({ line, greyed = false, full = false, source, actions }: EntryLineProps) {
  const result = line?.result ?? null;
  const fault = result?.kind === 'error' ? result.error : null;
  const faulty = fault !== null;
  const value = faulty ? (line?.before ?? null) : result;
  const dimension = value && sayDimension(value);
  const dim = greyed || faulty;

  return (
    <div
      data-row
      data-wide={value && isWide(value) ? '' : undefined}
      className="group/row grid not-has-[[data-list]]:break-inside-avoid grid-cols-[5.5rem_minmax(0,1fr)] gap-x-2.5 gap-y-1.5 lg:grid-cols-[5.5rem_minmax(0,1fr)_12rem] print:grid-cols-[5.5rem_minmax(0,1fr)_10rem] print:data-wide:grid-cols-[5.5rem_minmax(0,1fr)]"
    >
      <div>{result && <Balloon sign={signOf(result)} faulty={faulty} />}</div>
      <div
        className={`min-w-0 space-y-1.5 max-sm:col-span-2 ${value?.kind === 'list' ? 'lg:col-span-2 print:col-span-1' : ''}`}
      >
        {value && (
          <div
            className={`-ml-1 min-h-balloon scroll-hint overflow-x-auto overflow-y-hidden py-1 pl-1 print:overflow-visible print:bg-none ${sizeOf(value)} ${dim ? 'opacity-55' : ''}`}
            // Only what may be wider than its row has to be reached by keyboard to be scrolled.
            tabIndex={mayScroll(value) ? 0 : undefined}
            role="group"
            aria-label={
              faulty ? 'Last good value' : showsExact(value) ? 'Exact value' : 'As written'
            }
          >
            <div className={isTooWideForPaper(value) ? 'print:hidden' : undefined}>
              <Value result={value} />
            </div>
            {isTooWideForPaper(value) && <OnPaper result={value} />}
            <Steps result={value} />
          </div>
        )}
        {value && !faulty && <WholeText result={value} />}
        {source}
        {value?.kind === 'list' && (
          <div className={dim ? 'opacity-55' : undefined}>
            <ListTable list={value} name={value.mark ?? value.source.trim()} />
          </div>
        )}
        {fault && (
          <p data-fault className="text-base text-ruddle">
            <Sentence text={fault.message} />
          </p>
        )}
        {full &&
          result &&
          'notices' in result &&
          result.notices.map((notice) => (
            <p key={notice.from} className="text-small text-ochre">
              <span className="font-semibold">Read so: </span>
              <Sentence text={notice.message} />
            </p>
          ))}
        <div className="flex flex-wrap items-end gap-x-3 gap-y-1.5">
          <div className={`min-w-0 max-w-full ${greyed ? 'opacity-55' : ''}`}>
            {result && <Compartments items={compartmentsOf(result, full)} />}
          </div>
          {actions}
        </div>
      </div>
      {dimension && (
        <div className="w-44 print:w-40 print:group-data-wide/row:col-start-2 print:group-data-wide/row:row-start-auto print:col-start-3 print:row-start-1 max-sm:col-start-2 max-sm:row-start-1 max-sm:justify-self-end sm:col-start-2 lg:col-start-3 lg:row-start-1 lg:not-print:w-full">
          <DimensionLine {...dimension} greyed={dim} />
        </div>
      )}
    </div>
  );
}
