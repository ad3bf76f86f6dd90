/** Correctly rounded decimals, half to even. A tie can only come from a rational, and those are rounded by exact division. */

import { enclose, floorDiv, signEl, type Enclosure } from './enclosure';
import { isRationalEl, isZeroEl, numerator } from './element';
import { bitLength } from './integers';
import type { El } from './tower';

/** One part of a decimal. `exact` is true when the string is the value itself. */
export interface Part {
  text: string;
  exact: boolean;
}

/** `digits` significant digits of a real element. Cost: one enclosure of 3.4 bits for each digit, rarely a second. */
export function decimalOf(x: El, digits: number): Part {
  if (isZeroEl(x)) return { text: '0', exact: true };
  if (!isRationalEl(x)) return irrationalDecimal((P) => enclose(x, P), digits, signEl(x) < 0);
  const r = rationalDigits(x, digits);
  const body = layOut(r.figures, r.exponent, digits, r.exact);
  return { text: signEl(x) < 0 ? `-${body}` : body, exact: r.exact };
}

/** `digits` significant digits of an irrational number that is given by enclosures and its sign. */
export function irrationalDecimal(
  encloseAt: (P: number) => Enclosure,
  digits: number,
  negative: boolean,
): Part {
  const r = irrationalDigits(encloseAt, digits, negative);
  const body = layOut(r.figures, r.exponent, digits, false);
  return { text: negative ? `-${body}` : body, exact: false };
}

interface Figures {
  /** `digits` figures; the first is not 0. */
  figures: string;
  /** Power of ten of the first figure. */
  exponent: number;
  exact: boolean;
}

function power(n: number): bigint {
  return 10n ** BigInt(n);
}

function rationalDigits(x: El, digits: number): Figures {
  let n = BigInt(numerator(x));
  if (n < 0n) n = -n;
  const d = BigInt(x.den);
  let exponent = Math.floor((bitLength(n) - bitLength(d)) * 0.30103);
  while (compareWithPower(n, d, exponent) < 0) exponent--;
  while (compareWithPower(n, d, exponent + 1) >= 0) exponent++;
  const s = digits - 1 - exponent;
  const num = s >= 0 ? n * power(s) : n;
  const den = s >= 0 ? d : d * power(-s);
  let q = num / den;
  const r = num % den;
  if (2n * r > den || (2n * r === den && q % 2n === 1n)) q += 1n;
  if (q >= power(digits)) {
    q /= 10n;
    exponent++;
  }
  return { figures: q.toString(), exponent, exact: r === 0n };
}

/** n/d against 10^e. The starting guess for e is only a guess: this decides. */
function compareWithPower(n: bigint, d: bigint, e: number): number {
  const l = e >= 0 ? n : n * power(-e);
  const r = e >= 0 ? d * power(e) : d;
  return l < r ? -1 : l > r ? 1 : 0;
}

function irrationalDigits(
  encloseAt: (P: number) => Enclosure,
  digits: number,
  negative: boolean,
): Figures {
  let low: bigint;
  let P = 64;
  for (; ; P *= 2) {
    const e = encloseAt(P);
    low = negative ? -e.high : e.low;
    if (low > 0n) break;
  }
  let exponent = Math.floor((bitLength(low) - P - 1) * 0.30103);
  P = Math.max(64, Math.ceil((digits - exponent) * 3.3219281) + 48);
  for (;;) {
    const e = encloseAt(P);
    const s = digits - 1 - exponent;
    const a = nearest(negative ? -e.high : e.low, s, P);
    const b = nearest(negative ? -e.low : e.high, s, P);
    if (a === b) {
      if (a >= power(digits)) {
        exponent++;
        continue;
      }
      if (a >= power(digits - 1)) return { figures: a.toString(), exponent, exact: false };
      exponent--;
    }
    P += 64 + (P >> 3);
  }
}

/** v·10^s/2^P to the nearest integer (an exact half goes up; the two bounds then differ or agree on what the value is). */
function nearest(v: bigint, s: number, P: number): bigint {
  const p = BigInt(P);
  if (s >= 0) return (v * power(s) + (1n << (p - 1n))) >> p;
  const d = power(-s) << p;
  return floorDiv(2n * v + d, 2n * d);
}

/** Positional while the point falls among or just before the figures, else with a power of ten. */
function layOut(figures: string, exponent: number, digits: number, exact: boolean): string {
  const f = exact ? figures.replace(/0+$/, '') : figures;
  if (exponent >= digits || exponent < -7) {
    return `${f[0]}${f.length > 1 ? `.${f.slice(1)}` : ''}e${exponent}`;
  }
  if (exponent < 0) return `0.${'0'.repeat(-exponent - 1)}${f}`;
  if (f.length <= exponent + 1) return f + '0'.repeat(exponent + 1 - f.length);
  return `${f.slice(0, exponent + 1)}.${f.slice(exponent + 1)}`;
}
