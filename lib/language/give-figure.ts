import type { Engine, Num } from '../engine/index';
import type { Circle, Line, Point } from '../geometry/index';
import { fromNum } from './pi-sum';
import type { CircleResult, LineResult, NumberPart, PointResult, Reach } from './result';
import type { NumberValue } from './values';
import type { FigureValue, Length } from './values-geometry';
import { composeWritten, isSum, unitAfter, withUnit } from './written';

type Given<T> = Omit<T, 'line' | 'source' | 'mark' | 'typeset' | 'notices'>;
export type GivenFigure = Given<PointResult> | Given<LineResult> | Given<CircleResult>;

/** Gives one number of a figure; `isCut` when it is a size that is cut or marked, and so has a cut size. */
export type GivePart = (value: NumberValue, isCut: boolean) => NumberPart;

/** Writes a figure out by its parts: coordinates, coefficients of the equation, centre and radius. */
export function giveFigure(engine: Engine, value: FigureValue, give: GivePart): GivenFigure {
  const part = (number: Num, length: Length, isCut: boolean): NumberPart =>
    give({ kind: 'number', sum: fromNum(engine, number), length }, isCut);
  switch (value.kind) {
    case 'point':
      return givePoint(value.figure, (number) => part(number, value.length, true));
    case 'circle':
      return giveCircle(value.figure, (number) => part(number, value.length, true));
    case 'line':
      return giveLine(
        value.figure,
        (number) => part(number, 0, false),
        (number) => part(number, value.length, false),
      );
  }
}

type Part = (number: Num) => NumberPart;

const textOf = ({ exact: { text }, unit }: NumberPart, value = text): string =>
  withUnit(value, unit);

const pairTex = (x: string, y: string): string => `\\left(${x},\\;${y}\\right)`;

function givePoint(point: Point, give: Part): Given<PointResult> {
  const [x, y] = [give(point.x), give(point.y)];
  return {
    kind: 'point',
    exact: composeWritten(
      [x.exact, y.exact],
      ([first, second]) => `point(${textOf(x, first)}, ${textOf(y, second)})`,
      ([first = '', second = '']) => pairTex(first, second) + unitAfter(x.unit),
    ),
    unit: x.unit,
    coordinates: { x, y },
    reach: reachOfParts([
      ['x', x],
      ['y', y],
    ]),
  };
}

function giveCircle(circle: Circle, give: Part): Given<CircleResult> {
  const [x, y, radius] = [give(circle.centre.x), give(circle.centre.y), give(circle.radius)];
  const unit = unitAfter(x.unit);
  return {
    kind: 'circle',
    exact: composeWritten(
      [x.exact, y.exact, radius.exact],
      ([first, second, third]) =>
        `circle(point(${textOf(x, first)}, ${textOf(y, second)}), ${textOf(radius, third)})`,
      ([first = '', second = '', third = '']) =>
        `${pairTex(first, second)}${unit},\\quad r=${bracket(radius, third, unit)}`,
    ),
    unit: x.unit,
    centre: { x, y },
    radius,
    reach: reachOfParts([
      ['the x of its centre', x],
      ['the y of its centre', y],
      ['its radius', radius],
    ]),
  };
}

function giveLine(line: Line, givePlain: Part, giveLength: Part): Given<LineResult> {
  const [a, b, c] = [givePlain(line.a), givePlain(line.b), giveLength(line.c)];
  return {
    kind: 'line',
    exact: composeWritten(
      [a.exact, b.exact, c.exact],
      ([first, second, third]) =>
        `line(${textOf(a, first)}, ${textOf(b, second)}, ${textOf(c, third)})`,
      ([first = '', second = '', third = '']) =>
        equationTex([
          { part: a, tex: first, factor: 'x' },
          { part: b, tex: second, factor: 'y' },
          { part: c, tex: third, factor: unitAfter(c.unit) },
        ]),
    ),
    unit: c.unit,
    coefficients: { a, b, c },
    reach: reachOfParts([
      ['its coefficient a', a],
      ['its coefficient b', b],
      ['its coefficient c', c],
    ]),
  };
}

interface Term {
  readonly part: NumberPart;
  readonly tex: string;
  /** `x`, `y`, a unit, or nothing. */
  readonly factor: string;
}

/** a x + b y + c = 0 without the terms that are 0 and the factors that are 1. */
function equationTex(terms: readonly Term[]): string {
  const written = terms
    .filter(({ part }) => part.exact.text !== '0')
    .map(({ part, tex, factor }) => {
      const isLetter = /^[xy]$/.test(factor);
      if (isLetter && part.exact.text === '1') return factor;
      if (isLetter && part.exact.text === '-1') return `-${factor}`;
      return bracket(part, tex, factor);
    });
  return `${written.reduce((before, term) => before + (term.startsWith('-') ? term : `+${term}`))}=0`;
}

/** A value before a factor or unit, in brackets where it is a sum. */
function bracket({ exact }: NumberPart, tex: string, factor: string): string {
  return factor !== '' && isSum(exact.staged ? (exact.text.split('; ').at(-1) ?? '') : exact.text)
    ? `\\left(${tex}\\right)${factor}`
    : tex + factor;
}

/** A figure is reached when all its parts are: then it can be struck from a unit, and from the figure they can be taken. */
function reachOfParts(parts: readonly (readonly [string, NumberPart])[]): Reach {
  const [missed] = parts.filter(([, { reach }]) => reach.straightedgeAndCompass !== true);
  if (missed === undefined) {
    const rational = parts.every(([, { degree }]) => degree === 1);
    return {
      straightedgeAndCompass: true,
      withTrisector: true,
      reason: rational
        ? 'All its parts are rational, so straightedge and compass reach it.'
        : 'All its parts are built from rational numbers by square roots, so straightedge and compass reach it.',
    };
  }
  const all = (verdicts: readonly (boolean | null)[]): boolean | null =>
    verdicts.includes(false) ? false : verdicts.includes(null) ? null : true;
  const compass = all(parts.map(([, { reach }]) => reach.straightedgeAndCompass));
  const [name, { reach }] =
    parts.find(([, part]) => part.reach.straightedgeAndCompass === compass) ?? missed;
  return {
    straightedgeAndCompass: compass,
    withTrisector: all(parts.map(([, part]) => part.reach.withTrisector)),
    reason: `Of its parts, ${name} decides. ${reach.reason}`,
  };
}
