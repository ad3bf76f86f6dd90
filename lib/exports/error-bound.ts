import type { Cut, DecimalResult } from '@/lib/language/index';

/** n · 10^exponent */
interface Scaled {
  n: bigint;
  exponent: number;
}

const ZERO: Scaled = { n: 0n, exponent: 0 };
/** Significant digits of a bound as it is written; it is rounded up to them. */
const SHOWN = 3;

/**
 * How far a written size can be from the exact value at most, as a plain decimal in the unit of both:
 * of a cut size its distance from the decimal, and the decimal's own rounding on top; of a decimal half
 * a unit in its last place; `0` where it is the value itself. Whole-number arithmetic, rounded up.
 */
export function maximumError(decimal: DecimalResult, cut: Cut | undefined): string {
  if (cut?.direction === 'exact') return '0';
  const parts = decimal.im === null ? [decimal.re] : [decimal.re, decimal.im];
  const own = decimal.terminates
    ? ZERO
    : parts.map((part) => halfLastPlace(part, decimal.digits)).reduce(larger);
  if (cut === undefined) return writeUp(own);
  const away = subtract(read(cut.value), read(decimal.re));
  return writeUp(add({ n: away.n < 0n ? -away.n : away.n, exponent: away.exponent }, own));
}

/** A decimal as results write it: plain, or with a power of ten. */
function read(text: string): Scaled {
  const [mantissa = '', power = '0'] = text.split('e');
  const [whole = '', fraction = ''] = mantissa.split('.');
  return { n: BigInt(whole + fraction), exponent: Number(power) - fraction.length };
}

function halfLastPlace(text: string, digits: number): Scaled {
  const { n, exponent } = read(text);
  if (n === 0n) return ZERO;
  const leading = lengthOf(n) - 1 + exponent;
  return { n: 5n, exponent: leading - digits };
}

const lengthOf = (n: bigint): number => (n < 0n ? -n : n).toString().length;

function aligned(a: Scaled, b: Scaled): [a: bigint, b: bigint, exponent: number] {
  const exponent = Math.min(a.exponent, b.exponent);
  const at = ({ n, exponent: own }: Scaled) => n * 10n ** BigInt(own - exponent);
  return [at(a), at(b), exponent];
}

function add(a: Scaled, b: Scaled): Scaled {
  const [x, y, exponent] = aligned(a, b);
  return { n: x + y, exponent };
}

const subtract = (a: Scaled, b: Scaled): Scaled => add(a, { n: -b.n, exponent: b.exponent });

function larger(a: Scaled, b: Scaled): Scaled {
  const [x, y] = aligned(a, b);
  return x >= y ? a : b;
}

/** The smallest decimal of a few digits that is not below the value. */
function writeUp({ n, exponent }: Scaled): string {
  if (n === 0n) return '0';
  const over = Math.max(0, lengthOf(n) - SHOWN);
  const unit = 10n ** BigInt(over);
  return writePlain((n + unit - 1n) / unit, exponent + over);
}

function writePlain(n: bigint, exponent: number): string {
  if (exponent >= 0) return (n * 10n ** BigInt(exponent)).toString();
  const digits = n.toString().padStart(1 - exponent, '0');
  const whole = digits.slice(0, exponent);
  const fraction = digits.slice(exponent).replace(/0+$/, '');
  return fraction === '' ? whole : `${whole}.${fraction}`;
}
