import { ApproximateSign, ReachedSign } from '@/components/drawing/compartments';
import { CELL, FIGURES, ROW, ScrollTable } from '@/components/ui/scroll-table';
import { Tex } from '@/components/ui/tex';
import type { ListResult, SingleItem } from '../result';
import { exactTex } from '../value-tex';
import { type ListCell, type ListRow, listRows, WIDE } from './list-rows';

/** A table of more rows than this is folded, */
const MOST_UNFOLDED = 10;
/** to so many of them. */
const SHOWN_FOLDED = 8;
/** Typesetting is dear: the rows after these have their exact values as text. */
const MOST_TYPESET = 100;
/** A longer exact value is read as text, opened by itself. */
const LONGEST_TYPESET = 240;

interface ListTableProps {
  list: Pick<ListResult, 'items'>;
  /** What the list is called: its mark or its source. */
  name: string;
}

/** The items of a list as a ruled table with running numbers; a long one is folded, without any script, but not on paper. */
export function ListTable({ list, name }: ListTableProps) {
  const { heads, rows, isWideForPaper } = listRows(list);
  const folds = rows.length > MOST_UNFOLDED;
  const shown = folds ? SHOWN_FOLDED : rows.length;
  return (
    <div
      data-list
      data-sizes-on-paper={isWideForPaper ? '' : undefined}
      className="group/list min-w-0 print:data-sizes-on-paper:[&_:is(thead_th:last-child,[data-exact])]:hidden"
    >
      <ScrollTable caption={`Items of ${name}`} heads={['No.', ...heads]}>
        {rows.map((row, index) => (
          <tr
            key={row.number}
            className={`${ROW} ${index < shown ? '' : 'hidden group-has-[[data-all][open]]/list:table-row print:table-row'}`}
          >
            <Row row={row} span={heads.length} typesets={index < MOST_TYPESET} />
          </tr>
        ))}
      </ScrollTable>
      {isWideForPaper && (
        <p className="hidden pt-1 text-small print:block">
          The exact values are too long for this sheet of paper; they are those of the line above.
        </p>
      )}
      {folds && (
        <details data-all className="group/all print:hidden">
          <summary className="inline-block cursor-pointer py-1 text-small text-snapline underline-offset-4 hover:underline">
            <span className="group-open/all:hidden">{`All ${list.items.length} items`}</span>
            <span className="hidden group-open/all:inline">{`The first ${SHOWN_FOLDED} rows only`}</span>
          </summary>
        </details>
      )}
    </div>
  );
}

function Row({ row, span, typesets }: { row: ListRow; span: number; typesets: boolean }) {
  const isNested = row.number.includes('.');
  return (
    <>
      <th scope="row" className={`${FIGURES} w-0 text-soft ${isNested ? 'pl-6' : ''}`}>
        {row.number}
      </th>
      {row.kind === 'list' ? (
        <td colSpan={span} className={`${CELL} text-soft`}>
          {`a list of ${row.count}`}
        </td>
      ) : (
        row.cells.map((cell, index) => <Cell key={index} cell={cell} typesets={typesets} />)
      )}
    </>
  );
}

function Cell({ cell, typesets }: { cell: ListCell; typesets: boolean }) {
  switch (cell.kind) {
    case 'exact':
      return (
        <td data-exact className={CELL}>
          <Exact item={cell.item} typesets={typesets} />
        </td>
      );
    case 'reach':
      return (
        <td className={CELL}>
          <Reach reach={cell.item.reach} />
        </td>
      );
    case 'figure':
      return (
        <td className={FIGURES}>
          <span style={{ paddingLeft: `${cell.indent}ch` }}>{cell.text}</span>
          {cell.rounded !== null && (
            <span className="ml-2 font-sans text-soft print:block print:ml-0">{cell.rounded}</span>
          )}
        </td>
      );
  }
}

const TEXT = 'block whitespace-normal font-mono text-small [overflow-wrap:anywhere]';

function Exact({ item, typesets }: { item: SingleItem; typesets: boolean }) {
  const { text, staged } = item.exact;
  if (staged || text.length > LONGEST_TYPESET)
    return (
      <details>
        <summary className="text-snapline underline-offset-4 hover:underline print:hidden">
          {`${text.length} characters`}
        </summary>
        <code
          className={`${TEXT} mt-1 max-h-72 w-96 overflow-y-auto print:max-h-none print:w-auto`}
        >
          {text}
        </code>
      </details>
    );
  if (!typesets) return <code className="font-mono text-small">{text}</code>;
  const isWide = text.length > WIDE;
  return (
    <>
      <span className={isWide ? 'print:hidden' : 'text-base'}>
        <Tex tex={exactTex(item)} />
      </span>
      {isWide && <code className={`${TEXT} hidden print:block`}>{text}</code>}
    </>
  );
}

/** The verdict on one item, in a word or two. */
function Reach({ reach }: { reach: SingleItem['reach'] }) {
  if (reach.straightedgeAndCompass)
    return (
      <span className="font-semibold text-lichen">
        <ReachedSign />
        straightedge and compass
      </span>
    );
  return (
    <span className="font-semibold text-ochre">
      <ApproximateSign />
      {reach.straightedgeAndCompass === null
        ? 'not decided'
        : reach.withTrisector === true
          ? 'with an angle trisector'
          : 'not reached'}
    </span>
  );
}
