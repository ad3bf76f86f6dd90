import { isqrt } from '../../engine/integers';
import type { Candidate, Search, Wanted } from '../candidate';
import { greatestCommonDivisor } from '../form';
import { hypotenuse } from '../strikes';

/** √(p² + q²)/d: right triangles with legs of p and q, p ≥ q, of the d parts of the base; the two p around each target. */
export function hypotenuseSearch(wanted: Wanted): Search {
  const { limits, base } = wanted;
  return {
    family: 'hypotenuse',
    candidates: triangles(wanted),
    ranges: `right triangles with legs up to ${limits.leg} of up to ${limits.parts} parts of the ${base}`,
  };
}

function* triangles({ arithmetic, ratio, limits, base }: Wanted): Generator<Candidate> {
  const square = (ratio.low * ratio.high) >> arithmetic.shift;
  const longest = BigInt(limits.leg);
  for (let d = 1n; d <= BigInt(limits.parts); d += 1n) {
    const whole = (square * d * d) >> arithmetic.shift;
    const short = whole - longest * longest;
    if (short > longest * longest) return;
    const first = short > 0n ? isqrt(short) : 1n;
    for (let q = first > 1n ? first : 1n; q <= longest && 2n * q * q <= whole + q; q += 1n) {
      const rest = whole - q * q;
      const below = rest > 0n ? isqrt(rest) : 0n;
      for (const p of [below, below + 1n]) {
        if (p < q || p > longest || greatestCommonDivisor(greatestCommonDivisor(p, q), d) > 1n)
          continue;
        yield {
          family: 'hypotenuse',
          form: { kind: 'hypotenuse', p, q, d },
          strikes: () => hypotenuse(p, q, d),
          how: () =>
            d === 1n
              ? `The hypotenuse over legs of ${p} and ${q} times the ${base}.`
              : `The hypotenuse over legs of ${p} and ${q} of the ${d} parts of the ${base}.`,
          source: null,
        };
      }
    }
  }
}
