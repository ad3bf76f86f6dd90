import type { CellAnswer } from '@/lib/evaluation';
import type { Difference } from './types';

type Result = CellAnswer['results'][number];
type Results = readonly Pick<CellAnswer, 'id' | 'results'>[];
type Item = Extract<Result, { kind: 'list' }>['items'][number];
type Part = Extract<Result, { kind: 'circle' }>['radius'];
type Facet = [field: string, value: string];

/**
 * Compares results line by line in what people cut by: kind, exact value, decimal, cut size, reach,
 * verdict and fault. Wording, degree and tower are not compared: they say how, not how much.
 * @returns one entry for each field of a line that differs, in the order of the sheet
 */
export function compareResults(frozen: Results, now: Results): Difference[] {
  const ids = new Set([...frozen, ...now].map(({ id }) => id));
  const linesOf = (results: Results, id: string) =>
    new Map(results.find((cell) => cell.id === id)?.results.map((line) => [line.line, line]));
  return [...ids].flatMap((cell) => {
    const [before, after] = [linesOf(frozen, cell), linesOf(now, cell)];
    const numbers = [...new Set([...before.keys(), ...after.keys()])].sort((a, b) => a - b);
    return numbers.flatMap((line) => compareLine(cell, line, before.get(line), after.get(line)));
  });
}

function compareLine(
  cell: string,
  line: number,
  before: Result | undefined,
  after: Result | undefined,
): Difference[] {
  const one = before ?? after;
  if (one === undefined) return [];
  const place = { cell, line, mark: one.mark, source: one.source.trim() };
  const [was, is] = [facetsOf(before), facetsOf(after)];
  const fields = [...new Set([...was.keys(), ...is.keys()])];
  return fields
    .filter((field) => was.get(field) !== is.get(field))
    .map((field) => ({
      ...place,
      field,
      frozen: was.get(field) ?? null,
      now: is.get(field) ?? null,
    }));
}

function facetsOf(result: Result | undefined): Map<string, string> {
  if (result === undefined) return new Map();
  return new Map<string, string>([['kind', result.kind], ...valueFacets(result)]);
}

function valueFacets(result: Result): Facet[] {
  switch (result.kind) {
    case 'truth':
      return [['verdict', result.truth.value ? 'true' : 'false']];
    case 'error':
      return [['fault', result.error.code]];
    case 'function':
      return [['exact', result.signature]];
    default:
      return itemFacets(result, '');
  }
}

function itemFacets(item: Result | Item, before: string): Facet[] {
  switch (item.kind) {
    case 'number':
      return [[`${before}exact`, item.exact.text], ...partFacets(item, before)];
    case 'angle':
      return [
        [`${before}exact`, item.exact.text],
        [`${before}decimal`, `${item.decimal.re}°`],
        [`${before}reach`, sayReach(item.reach)],
      ];
    case 'point':
      return [
        [`${before}exact`, item.exact.text],
        ...partFacets(item.coordinates.x, `${before}x `),
        ...partFacets(item.coordinates.y, `${before}y `),
      ];
    case 'line':
      return [
        [`${before}exact`, item.exact.text],
        ...partFacets(item.coefficients.a, `${before}a `),
        ...partFacets(item.coefficients.b, `${before}b `),
        ...partFacets(item.coefficients.c, `${before}c `),
      ];
    case 'circle':
      return [
        [`${before}exact`, item.exact.text],
        ...partFacets(item.centre.x, `${before}centre x `),
        ...partFacets(item.centre.y, `${before}centre y `),
        ...partFacets(item.radius, `${before}radius `),
      ];
    case 'list':
      return item.items.flatMap((one, index) => itemFacets(one, `${before}${index + 1}: `));
    default:
      return [];
  }
}

function partFacets(part: Part, before: string): Facet[] {
  const { decimal, unit, cut, reach } = part;
  const of = unit === null ? '' : ` ${unit}`;
  const facets: Facet[] = [
    [`${before}decimal`, `${decimal.re}${decimal.im === null ? '' : ` and ${decimal.im} i`}${of}`],
    [`${before}reach`, sayReach(reach)],
  ];
  if (cut !== undefined) facets.push([`${before}cut size`, `${cut.value}${of}, ${cut.direction}`]);
  return facets;
}

function sayReach({ straightedgeAndCompass, withTrisector }: Part['reach']): string {
  if (straightedgeAndCompass === null) return 'undecided';
  if (straightedgeAndCompass) return 'straightedge and compass';
  return withTrisector === true ? 'with a trisector' : 'not reached';
}
