/** The exact fraction that a decimal literal stands for: `0.1` is 1/10. Accepts the literals of the grammar only. */
export function fractionOfLiteral(text: string): { n: bigint; d: bigint } {
  const [whole = '', fraction = ''] = text.split('.');
  const digits = BigInt(`0${whole}${fraction}`);
  return { n: digits, d: 10n ** BigInt(fraction.length) };
}

/** n/d as a decimal without rounding, or null when it does not end. d > 0. */
export function terminatingDecimal(n: bigint, d: bigint): string | null {
  let twos = 0;
  let fives = 0;
  let rest = d / gcd(n < 0n ? -n : n, d);
  const reduced = rest;
  for (; rest % 2n === 0n; rest /= 2n) twos += 1;
  for (; rest % 5n === 0n; rest /= 5n) fives += 1;
  if (rest !== 1n) return null;
  const places = Math.max(twos, fives);
  const scaled = ((n / (d / reduced)) * 10n ** BigInt(places)) / reduced;
  return placePoint(scaled, places);
}

function placePoint(scaled: bigint, places: number): string {
  const digits = (scaled < 0n ? -scaled : scaled).toString().padStart(places + 1, '0');
  const sign = scaled < 0n ? '-' : '';
  return places === 0
    ? sign + digits
    : `${sign}${digits.slice(0, -places)}.${digits.slice(-places)}`;
}

/** Greatest common divisor of two numbers that are not negative; gcd(0, d) is d. */
export function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}
