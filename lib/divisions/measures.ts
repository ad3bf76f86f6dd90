import { createEngine, type Engine, type Num } from '../engine';
import { settledDecimal } from './decimals';
import { cosineDegree } from './numbers';
import { decideDivision } from './reach';
import type { Radius } from './request';
import { encloseCosine, encloseSine } from './turn-value';

/** A length or an area: correctly rounded decimal, and the exact value in writing where that is short enough to read. */
export interface Measure {
  decimal: string;
  exact: { text: string; tex: string } | null;
}

/** Sizes of the regular polygon on a circle, in the unit of the radius and its square. */
export interface Measures {
  side: Measure;
  apothem: Measure;
  area: Measure;
}

/** A corner of the polygon, from the centre; corner 0 lies on the datum (the x-axis), the rest follow anticlockwise. */
export interface Vertex {
  number: number;
  x: Measure;
  y: Measure;
}

/** Above these degrees of cos(2π/n) the sizes, and the corners, are hardly ever short enough to read. */
const READABLE_SIZES = 16;
const READABLE_CORNERS = 8;
const READABLE_LENGTH = 120;
/** About a tenth of a second. */
const STEPS = 1_000_000;

/**
 * side = 2R·sin(π/n), apothem = R·cos(π/n), area = n/2·R²·sin(2π/n).
 * Accepts n ≥ 3 and 1 ≤ digits ≤ 1000. Decimals are decided by enclosures; exact values come from the engine where
 * square roots reach the division and the value can be read. Cost: microseconds for decimals, below a second for exact forms.
 */
export function measure(parts: number, radius: Radius, digits = 15): Measures {
  const n = BigInt(parts);
  const { n: a, d: b } = radius;
  const write = exactWriter(parts, READABLE_SIZES);
  return {
    side: {
      decimal: settledDecimal(encloseSine(1n, 2n * n, { n: 2n * a, d: b }), digits),
      exact: write((e) => e.mul(e.rational(2n * a, b), e.sinTurn(1n, 2n * n))),
    },
    apothem: {
      decimal: settledDecimal(encloseCosine(1n, 2n * n, radius), digits),
      exact: write((e) => e.mul(e.rational(a, b), e.cosTurn(1n, 2n * n))),
    },
    area: {
      decimal: settledDecimal(encloseSine(1n, n, { n: n * a * a, d: 2n * b * b }), digits),
      exact: write((e) => e.mul(e.rational(n * a * a, 2n * b * b), e.sinTurn(1n, n))),
    },
  };
}

/** `count` corners from number `first` on, with the same care. Accepts 0 ≤ first, first + count ≤ n. */
export function vertices(
  parts: number,
  radius: Radius,
  { first = 0, count = parts, digits = 15 } = {},
): Vertex[] {
  const n = BigInt(parts);
  const write = exactWriter(parts, READABLE_CORNERS);
  return Array.from({ length: count }, (_, offset) => {
    const k = BigInt(first + offset);
    return {
      number: first + offset,
      x: {
        decimal: settledDecimal(encloseCosine(k, n, radius), digits),
        exact: write((e) => e.mul(e.rational(radius.n, radius.d), e.cosTurn(k, n))),
      },
      y: {
        decimal: settledDecimal(encloseSine(k, n, radius), digits),
        exact: write((e) => e.mul(e.rational(radius.n, radius.d), e.sinTurn(k, n))),
      },
    };
  });
}

/** Writes values of one engine; null where square roots do not reach the division, or the writing too long to read. */
function exactWriter(
  parts: number,
  mostDegree: number,
): (make: (engine: Engine) => Num) => Measure['exact'] {
  const readable = cosineDegree(parts) <= mostDegree && decideDivision(BigInt(parts)).compass;
  if (!readable) return () => null;
  const engine = createEngine({ steps: STEPS });
  let spent = false;
  return (make) => {
    if (spent) return null;
    const outcome = engine.attempt(() => engine.write(make(engine)));
    if (outcome.kind !== 'value') {
      spent = true;
      return null;
    }
    const { text, tex, staged } = outcome.value;
    return staged || text.length > READABLE_LENGTH ? null : { text, tex };
  };
}
