import type { ItemResult, ListResult, NumberPart } from '@/lib/language/index';
import { cutTex, decimalTex, figureParts, unitTex } from './tex-size';

/** A table that needs no package cannot break over pages: it is set in pieces of so many rows, each with its head. */
const ROWS = 24;

/** The items of a list as ruled tables: running number, decimal, cut size. A list within it has its items after it. */
export function listTex(list: Pick<ListResult, 'items'>): string {
  const rows = rowsOf(list.items);
  return Array.from({ length: Math.ceil(rows.length / ROWS) }, (_, piece) =>
    [
      '\\noindent{\\small\\begin{tabular}{@{}r|p{0.5\\linewidth}|p{0.36\\linewidth}@{}}\\hline',
      '\\textbf{No.}&\\textbf{Decimal}&\\textbf{Cut size}\\\\\\hline',
      ...rows.slice(piece * ROWS, (piece + 1) * ROWS),
      '\\end{tabular}\\par}',
    ].join('\n'),
  ).join('\n\n');
}

const row = (number: string, decimal: string, cut: string): string =>
  `${number}&\\raggedright ${decimal}&\\raggedright ${cut}\\tabularnewline\\hline`;

function rowsOf(items: readonly ItemResult[], before = ''): string[] {
  return items.flatMap((item, index) => {
    const number = `${before}${index + 1}`;
    if (item.kind === 'list')
      return [
        row(number, `a list of ${item.items.length}`, ''),
        ...rowsOf(item.items, `${number}.`),
      ];
    const cuts = partsOf(item).flatMap(([name, part]) =>
      part.cut === undefined ? [] : [`${name}${cutTex(part.cut, part.unit ?? '')}`],
    );
    return [row(number, decimalsOf(item), cuts.join('; '))];
  });
}

type SingleItem = Exclude<ItemResult, { kind: 'list' }>;

/** The numbers of an item, each with its name before it where there are several; an angle has none. */
function partsOf(item: SingleItem): [name: string, part: NumberPart][] {
  if (item.kind === 'angle') return [];
  if (item.kind === 'number') return [['', item]];
  return figureParts(item).map(([name, part]) => [`${name} `, part]);
}

function decimalsOf(item: SingleItem): string {
  if (item.kind === 'angle') return `$${decimalTex(item.decimal.re)}^{\\circ}$`;
  return partsOf(item)
    .map(([name, { decimal, unit }]) => {
      const { re, im } = decimal;
      const imaginary = im === null ? '' : `${im.startsWith('-') ? '' : '+'}${decimalTex(im)}\\,i`;
      return `${name}$${decimalTex(re)}${imaginary}${unit === null ? '' : unitTex(unit)}$`;
    })
    .join('; ');
}
