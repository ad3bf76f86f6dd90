import type { Reevaluation } from '@/lib/notebooks/types';
import { Notice } from '@/components/ui/notice';
import { CELL, FIGURES, ROW, ScrollTable } from '@/components/ui/scroll-table';

/** What the engine says today beside what was issued; the issued figures stay as they are. */
export function Differences({ answer }: { answer: Reevaluation }) {
  const { differences, engineNow, engineThen, lines } = answer;
  const engines =
    engineNow === engineThen
      ? `The engine is the same as then, ${engineNow}.`
      : `Issued with engine ${engineThen}, worked out again with engine ${engineNow}.`;
  if (differences.length === 0) {
    return (
      <Notice tone="good" title="All equal">
        {lines === 1 ? 'The one line says' : `All ${lines} lines say`} what was issued: exact
        values, decimals, cut sizes and reach. {engines}
      </Notice>
    );
  }
  const places = new Set(differences.map(({ cell, line }) => `${cell} ${line}`)).size;
  return (
    <>
      <Notice tone="caution" title={places === 1 ? '1 line differs' : `${places} lines differ`}>
        {engines} What was issued stays as it is; issue a new revision to hand the other figures on.
      </Notice>
      <ScrollTable
        caption="What differs, line by line"
        heads={['Mark', 'Line', 'What', 'As issued', 'Worked out today']}
      >
        {differences.map(({ cell, line, mark, source, field, frozen, now }) => (
          <tr key={`${cell} ${line} ${field}`} className={ROW}>
            <th scope="row" className={`${CELL} font-mono`}>
              {mark ?? '–'}
            </th>
            <td className={`${CELL} font-mono`}>{source}</td>
            <td className={CELL}>{field}</td>
            <td className={FIGURES}>{frozen ?? 'nothing'}</td>
            <td className={FIGURES}>{now ?? 'nothing'}</td>
          </tr>
        ))}
      </ScrollTable>
    </>
  );
}
