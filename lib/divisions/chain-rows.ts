import { carlyleCircle, type CarlyleCircle } from './carlyle';
import type { Chain, Combination, Quadratic } from './chain';
import { valueOf } from './check-chain';
import { settledDecimal } from './decimals';
import { atOnce } from './fixed-point';
import { periodValues, type Period, type PeriodValues } from './periods';

/** A quadratic as it is shown: formulas, roots in decimals and its Carlyle circle. */
export interface ChainRow {
  quadratic: Quadratic;
  tex: string;
  larger: string;
  smaller: string;
  circle: CarlyleCircle;
}

/** Quadratics of a chain from number `first` on. Cost: one table of cosines, then microseconds for each. */
export function chainRows(
  chain: Chain,
  { first = 0, count = chain.quadratics.length, digits = 12 } = {},
): ChainRow[] {
  const tables = new Map<number, PeriodValues>();
  const values = (bits: number) => {
    let table = tables.get(bits);
    if (table === undefined) {
      table = atOnce(periodValues(chain.prime, bits));
      tables.set(bits, table);
    }
    return table;
  };
  const root = (period: Period) =>
    settledDecimal((bits) => {
      const table = values(bits);
      const error = table.error(period.level);
      const value = table.of(period);
      return { low: value - error, high: value + error, scale: 1n << BigInt(bits) };
    }, digits);
  return chain.quadratics.slice(first, first + count).map((quadratic) => ({
    quadratic,
    tex: quadraticTex(quadratic),
    larger: root(quadratic.larger),
    smaller: root(quadratic.smaller),
    circle: carlyleCircle((bits) => {
      const table = values(bits);
      const fixed = (combination: Combination) => ({
        value: valueOf(combination, table),
        error: combination.terms.reduce(
          (sum, { level, coefficient }) => sum + BigInt(Math.abs(coefficient)) * table.error(level),
          0n,
        ),
      });
      return { sum: fixed(quadratic.sum), product: fixed(quadratic.product) };
    }, digits),
  }));
}

export function periodTex({ level, index }: Period): string {
  return `\\eta_{${level},${index}}`;
}

/** x² − s·x + p = 0 with s and p written out. */
export function quadraticTex({ sum, product }: Quadratic): string {
  const first = sum.terms[0];
  const linear = first === undefined ? 'x^2+x' : `x^2-${periodTex(first)}\\,x`;
  const terms = product.terms.map((term) => {
    const size = Math.abs(term.coefficient);
    return `${term.coefficient < 0 ? '-' : '+'}${size === 1 ? '' : size}${periodTex(term)}`;
  });
  const constant =
    product.constant === 0 ? '' : `${product.constant < 0 ? '' : '+'}${product.constant}`;
  return `${linear}${terms.join('')}${constant}=0`;
}
