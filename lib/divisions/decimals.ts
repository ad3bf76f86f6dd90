/** A real number known to lie between low/scale and high/scale, ends included; scale > 0. */
export interface Enclosure {
  low: bigint;
  high: bigint;
  scale: bigint;
}

/** Precision at which a decimal that will not settle is given up as a fault of ours. */
const MOST_BITS = 16384;

/**
 * The correctly rounded decimal of a number given by enclosures of any precision: `enclose` is asked with doubling
 * precision until both ends round to the same figures. Accepts numbers that are irrational, or enclosed exactly.
 */
export function settledDecimal(enclose: (bits: number) => Enclosure, digits: number): string {
  for (let bits = 64 + 4 * digits; bits <= MOST_BITS; bits *= 2) {
    const { low, high, scale } = enclose(bits);
    const text = rationalDecimal(low, scale, digits);
    if (text === rationalDecimal(high, scale, digits)) return text;
  }
  throw new Error('A decimal did not settle.');
}

/**
 * n/d to `digits` significant digits, half to even, without an exponent; d > 0. What ends earlier is written without
 * trailing zeros.
 */
export function rationalDecimal(n: bigint, d: bigint, digits: number): string {
  if (n === 0n) return '0';
  const size = n < 0n ? -n : n;
  // 10^lead ≤ size/d < 10^(lead+1), found from the lengths and put right by comparing.
  let lead = size.toString().length - d.toString().length;
  if (isBelow(size, d, lead)) lead -= 1;
  let places = digits - 1 - lead;
  let whole = roundedQuotient(size, d, places);
  if (whole.toString().length > digits) {
    places -= 1;
    whole /= 10n;
  }
  const sign = n < 0n ? '-' : '';
  if (places <= 0) return sign + (whole * 10n ** BigInt(-places)).toString();
  const text = whole.toString().padStart(places + 1, '0');
  const fraction = text.slice(-places).replace(/0+$/, '');
  return sign + text.slice(0, -places) + (fraction === '' ? '' : `.${fraction}`);
}

/** size/d < 10^exponent */
function isBelow(size: bigint, d: bigint, exponent: number): boolean {
  return exponent >= 0 ? size < d * 10n ** BigInt(exponent) : size * 10n ** BigInt(-exponent) < d;
}

/** size/d · 10^places, half to even. */
function roundedQuotient(size: bigint, d: bigint, places: number): bigint {
  const top = places > 0 ? size * 10n ** BigInt(places) : size;
  const bottom = places < 0 ? d * 10n ** BigInt(-places) : d;
  const quotient = top / bottom;
  const twice = 2n * (top % bottom);
  return twice > bottom || (twice === bottom && quotient % 2n === 1n) ? quotient + 1n : quotient;
}
