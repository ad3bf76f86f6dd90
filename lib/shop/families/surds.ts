import type { Candidate, Search, Wanted } from '../candidate';
import { greatestCommonDivisor } from '../form';
import { type Strikes, rootOfWhole, surd } from '../strikes';

/** (a + b√c)/d with c free of squares: for each b, c and d the two whole a around the target. */
export function surdSearch(wanted: Wanted): Search {
  const { radicand, factor, divisor } = wanted.limits;
  return {
    family: 'surd',
    candidates: surds(wanted),
    ranges: `(a + b√c)/d with c up to ${radicand}, b from -${factor} to ${factor}, d up to ${divisor} and the nearest a`,
  };
}

function* surds({ arithmetic, ratio, limits, base }: Wanted): Generator<Candidate> {
  const most = BigInt(limits.factor);
  for (const c of squareFree(BigInt(limits.radicand))) {
    const root = arithmetic.rootOf(c).low;
    const strikesOfRoot: Strikes = rootOfWhole(c);
    for (let d = 1n; d <= BigInt(limits.divisor); d += 1n) {
      for (let size = 1n; size <= most; size += 1n) {
        for (const b of [size, -size]) {
          const below = (ratio.low * d - b * root) >> arithmetic.shift;
          for (const a of [below, below + 1n]) {
            // What is not seen to lie above 0 cannot be struck.
            if ((a << arithmetic.shift) + b * root <= most) continue;
            if (greatestCommonDivisor(greatestCommonDivisor(a, b), d) > 1n) continue;
            yield {
              family: 'surd',
              form: { kind: 'surd', a, b, c, d },
              strikes: () => surd(a, b, strikesOfRoot, d),
              how: () => tell(a, b, c, d, base),
              source: null,
            };
          }
        }
      }
    }
  }
}

function tell(a: bigint, b: bigint, c: bigint, d: bigint, base: string): string {
  const size = b < 0n ? -b : b;
  const root = size === 1n ? `√${c}` : `${size}√${c}`;
  const sum =
    a === 0n ? root : b < 0n ? `${a} - ${root}` : a < 0n ? `${root} - ${-a}` : `${a} + ${root}`;
  const whole = d === 1n ? sum : a === 0n ? `${root}/${d}` : `(${sum})/${d}`;
  const steps = [
    'the root',
    ...(size === 1n ? [] : ['its multiple']),
    ...(a === 0n ? [] : [`the sum or difference with the ${base}`]),
    ...(d === 1n ? [] : ['equal parts of the whole']),
  ];
  return `${whole} of the ${base}: ${steps.join(', ')}.`;
}

function squareFree(most: bigint): bigint[] {
  const found: bigint[] = [];
  for (let c = 2n; c <= most; c += 1n) {
    let free = true;
    for (let root = 2n; root * root <= c; root += 1n) if (c % (root * root) === 0n) free = false;
    if (free) found.push(c);
  }
  return found;
}
