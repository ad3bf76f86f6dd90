import type { Compartment } from '@/components/drawing/compartments';
import type { Result, SingleItem } from './result';
import {
  DIRECTIONS,
  type NumberResult,
  reachCompartment,
  sayDecimal,
  sayUnit,
  shorten,
} from './say-number';

export type FigureResult = Extract<Result, { kind: 'point' | 'line' | 'circle' }>;
/** A figure on a line of its own, or as an item of a list. */
type Figure = FigureResult | Extract<SingleItem, { kind: 'point' | 'line' | 'circle' }>;
type Part = Pick<NumberResult, 'decimal' | 'unit' | 'cut' | 'degree'>;

export const isFigure = (item: SingleItem): item is Extract<SingleItem, Figure> =>
  item.kind === 'point' || item.kind === 'line' || item.kind === 'circle';

/** The numbers that fix a figure, by the names they have on the sheet. */
export function partsOf(result: Figure): [label: string, part: Part][] {
  switch (result.kind) {
    case 'point':
      return [
        ['x', result.coordinates.x],
        ['y', result.coordinates.y],
      ];
    case 'circle':
      return [
        ['Centre x', result.centre.x],
        ['Centre y', result.centre.y],
        ['Radius', result.radius],
      ];
    case 'line':
      return [
        ['a', result.coefficients.a],
        ['b', result.coefficients.b],
        ['c', result.coefficients.c],
      ];
  }
}

const withUnit = (figure: string, unit: string | null) =>
  unit === null ? figure : `${figure} ${sayUnit(unit)}`;

/** Each number of the figure with its cut size, and what reaches the whole; `full` adds degrees and the reason. */
export function figureCompartments(result: FigureResult, full: boolean): Compartment[] {
  const parts = partsOf(result);
  const items = parts.flatMap(([label, part]): Compartment[] => {
    const decimal = { label, value: withUnit(sayDecimal(part, full), part.unit), figures: true };
    if (!part.cut) return [decimal];
    const cut = `${withUnit(part.cut.value, part.unit)}, ${DIRECTIONS[part.cut.direction]}`;
    // What is cut exactly is said once.
    if (part.cut.direction === 'exact') return [{ ...decimal, value: cut }];
    return [decimal, { label: `${label}, cut`, value: cut, figures: true }];
  });
  items.push(reachCompartment(result.reach));
  if (!full) return items;
  for (const [label, { degree }] of parts)
    items.push({
      label: `Degree of ${label}`,
      value: degree === null ? 'over the limit' : String(degree),
    });
  if (result.reach.straightedgeAndCompass !== true)
    items.push({ label: 'Because', value: result.reach.reason });
  return items;
}

const FEW_FIGURES = 7;

/** Coordinates in brackets, as cut where there is a cutting step. */
function sayPair(x: Part, y: Part): string {
  const [first, second] = [x, y].map(({ cut, decimal }) =>
    cut ? cut.value : shorten(decimal.re, FEW_FIGURES),
  );
  return withUnit(`(${first}, ${second})`, x.unit);
}

const sayLength = ({ cut, decimal, unit }: Part) =>
  withUnit(cut ? cut.value : shorten(decimal.re, FEW_FIGURES), unit);

/** What the index of marks shows beside a name. */
export function sayFigureBriefly(result: Figure): string {
  switch (result.kind) {
    case 'point':
      return sayPair(result.coordinates.x, result.coordinates.y);
    case 'circle':
      return `circle, r ${sayLength(result.radius)}`;
    case 'line':
      return 'line';
  }
}

/** For whoever listens instead of looking. */
export function sayFigure(result: FigureResult): string {
  const reached =
    result.reach.straightedgeAndCompass === null
      ? 'reach not decided'
      : result.reach.straightedgeAndCompass
        ? 'reached with straightedge and compass'
        : 'not reached with straightedge and compass';
  switch (result.kind) {
    case 'point':
      return `the point ${sayFigureBriefly(result)}, ${reached}`;
    case 'circle':
      return `a circle about ${sayPair(result.centre.x, result.centre.y)} with the radius ${sayLength(result.radius)}, ${reached}`;
    case 'line': {
      const [a, b, c] = partsOf(result).map(([, part]) => sayLength(part));
      return `the line a x + b y + c = 0 with a ${a}, b ${b} and c ${c}, ${reached}`;
    }
  }
}
