import { type Fraction } from './interval';

export type Side = 'up' | 'down';

/** 10^exponent as a fraction. */
function tenTo(exponent: number): Fraction {
  return exponent >= 0
    ? { n: 10n ** BigInt(exponent), d: 1n }
    : { n: 1n, d: 10n ** BigInt(-exponent) };
}

/**
 * A fraction as a decimal of so many significant digits, rounded up or down along the number line.
 * Plain positional, with `e` below 10^-12 and from 10^21 on; trailing zeros after the point are left away.
 */
export function directedDecimal({ n, d }: Fraction, digits: number, side: Side): string {
  if (n === 0n) return '0';
  if (n < 0n) return `-${directedDecimal({ n: -n, d }, digits, side === 'up' ? 'down' : 'up')}`;
  // 10^exponent ≤ n/d < 10^(exponent + 1), found from the lengths and then put right.
  let exponent = String(n).length - String(d).length;
  const start = tenTo(exponent);
  if (n * start.d < d * start.n) exponent -= 1;
  const scale = tenTo(digits - 1 - exponent);
  const [top, bottom] = [n * scale.n, d * scale.d];
  let whole = top / bottom;
  if (side === 'up' && whole * bottom !== top) whole += 1n;
  let figures = String(whole);
  if (figures.length > digits) [figures, exponent] = [figures.slice(0, digits), exponent + 1];
  return place(figures, exponent);
}

function place(figures: string, exponent: number): string {
  const trimmed = figures.replace(/0+$/, '');
  if (exponent < -12 || exponent > 20) {
    const rest = trimmed.slice(1);
    return `${trimmed[0] ?? '0'}${rest === '' ? '' : `.${rest}`}e${exponent}`;
  }
  if (exponent < 0) return `0.${'0'.repeat(-exponent - 1)}${trimmed}`;
  const whole = trimmed.slice(0, exponent + 1).padEnd(exponent + 1, '0');
  const rest = trimmed.slice(exponent + 1);
  return rest === '' ? whole : `${whole}.${rest}`;
}
