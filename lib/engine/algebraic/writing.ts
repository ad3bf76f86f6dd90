/** Text, TeX, digits and rounding of numbers beyond square roots. */
import { irrationalDecimal, type Part } from '../decimal';
import type { Enclosure } from '../enclosure';
import type { Budget } from '../limits';
import type { Multiple, Rounding } from '../types';
import type { Algebraic } from './algebraic';
import { placeOf } from './near';

/** `root(polynomial, place)`: text that parses back, and TeX. */
export function writeRoot(a: Algebraic, budget: Budget): { text: string; tex: string } {
  const { re, im } = placeOf(a, budget);
  const place = (times: string): string => {
    if (im === null) return re;
    const whole = re === '0' ? '' : re;
    return `${whole}${whole === '' || im.startsWith('-') ? '' : '+'}${im}${times}i`;
  };
  const text = writePolynomial(a.poly, '*', (k) => `x^${k}`);
  const tex = writePolynomial(a.poly, '', (k) => `x^{${k}}`);
  return {
    text: `root(${text}, ${place('*')})`,
    tex: `\\operatorname{root}\\left(${tex},\\ ${place('\\,')}\\right)`,
  };
}

/** Text of an integer polynomial in x, constant term first in the array, highest power first in the text. */
function writePolynomial(
  f: readonly bigint[],
  times: string,
  power: (k: number) => string,
): string {
  let out = '';
  for (let k = f.length - 1; k >= 0; k--) {
    const c = f[k] as bigint;
    if (c === 0n) continue;
    const size = c < 0n ? -c : c;
    const x = k === 0 ? '' : k === 1 ? 'x' : power(k);
    const body = k > 0 && size === 1n ? x : k === 0 ? `${size}` : `${size}${times}${x}`;
    out += c < 0n ? `-${body}` : out === '' ? body : `+${body}`;
  }
  return out;
}

/** Digits of a real number of degree 2 or more, hence irrational. */
export function decimalOfAlgebraic(a: Algebraic, digits: number, negative: boolean): Part {
  return irrationalDecimal((P) => a.box(P).re, digits, negative);
}

/** ⌊x⌋ of an irrational number given by enclosures. */
export function floorOfIrrational(encloseAt: (P: number) => Enclosure): bigint {
  for (let P = 64; ; P *= 2) {
    const { low, high } = encloseAt(P);
    const whole = low >> BigInt(P);
    if (whole === high >> BigInt(P)) return whole;
  }
}

/** x·n/d rounded to a whole number; x irrational, so there is no tie and no exact outcome. */
export function roundIrrational(
  encloseAt: (P: number) => Enclosure,
  n: bigint,
  d: bigint,
  rounding: Rounding,
): Multiple {
  // ⌊2·x·n/d⌋ tells the whole part and on which side of the half the value lies.
  const twice = floorOfIrrational((P) => {
    const { low, high } = encloseAt(P);
    const scaledLow = 2n * low * n;
    const scaledHigh = 2n * high * n;
    return { low: floorDivide(scaledLow, d), high: floorDivide(scaledHigh, d) + 1n };
  });
  const below = twice >> 1n;
  const up = rounding === 'up' || (rounding !== 'down' && (twice & 1n) === 1n);
  return up ? { multiple: below + 1n, direction: 'up' } : { multiple: below, direction: 'down' };
}

const floorDivide = (a: bigint, b: bigint): bigint => {
  const q = a / b;
  return a < 0n && q * b !== a ? q - 1n : q;
};
