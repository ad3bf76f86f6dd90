import type { Candidate, Search, Wanted } from '../candidate';
import { fraction } from '../form';
import { type Fraction, type Interval, type IntervalArithmetic, floorDiv } from '../interval';
import { cheapest, meanProportional, ratio, rootOfWhole, surd } from '../strikes';

/** How many fractions between two convergents are looked at. */
const BETWEEN = 8;

/**
 * Best approximations to a positive real number from below and above: the convergents of its continued fraction and the
 * fractions between them, that is the path to it in the Stern-Brocot tree, denominators rising.
 * Of a long run of fractions between two convergents only the last few are given, as the earlier ones are far worse.
 * Ends at the greatest denominator, or where the enclosure no longer tells the next whole part.
 * Source: Stern 1858, Brocot 1861; Hardy and Wright, chapter X.
 */
export function* bestFractions(
  arithmetic: IntervalArithmetic,
  target: Interval,
  greatest: number,
): Generator<Fraction> {
  const between = BigInt(BETWEEN);
  const most = BigInt(greatest);
  let [before, last]: [Fraction, Fraction] = [
    { n: 0n, d: 1n },
    { n: 1n, d: 0n },
  ];
  let [low, high] = [
    { n: target.low, d: arithmetic.one },
    { n: target.high, d: arithmetic.one },
  ];
  for (;;) {
    const [a, b] = [floorDiv(low.n, low.d), floorDiv(high.n, high.d)];
    const whole = a < b ? b : a;
    const from = whole > between ? whole - between : 0n;
    for (let step = from; step <= whole; step += 1n) {
      if (last.d !== 0n && step === 0n) continue;
      const next = { n: step * last.n + before.n, d: step * last.d + before.d };
      if (next.d > most) return;
      if (next.n > 0n) yield next;
    }
    // Both ends agree on this whole part as long as neither is it exactly; then the next one is of the inverse rest.
    if (a !== b || low.n === a * low.d || high.n === b * high.d) return;
    [before, last] = [last, { n: whole * last.n + before.n, d: whole * last.d + before.d }];
    [low, high] = [
      { n: high.d, d: high.n - whole * high.d },
      { n: low.d, d: low.n - whole * low.d },
    ];
  }
}

const PATH = `convergents and up to ${BETWEEN} fractions before each`;

/** p/q of the base. */
export function fractionSearch(wanted: Wanted): Search {
  const { arithmetic, ratio: target, limits, base } = wanted;
  function* candidates(): Generator<Candidate> {
    for (const { n, d } of bestFractions(arithmetic, target, limits.denominator)) {
      yield {
        family: 'fraction',
        form: fraction(n, d),
        strikes: () => ratio(n, d),
        how: () =>
          d === 1n
            ? `${n} times the ${base}, stepped along a line.`
            : `${n}/${d} of the ${base}, by equal parts on a ray and a parallel.`,
        source: null,
      };
    }
  }
  return {
    family: 'fraction',
    candidates: candidates(),
    ranges: `best fractions p/q of the ${base}, ${PATH}, with q up to ${limits.denominator}`,
  };
}

/** √(p/q) of the base, a mean proportional: the best fractions of the square of the target. */
export function rootSearch(wanted: Wanted): Search {
  const { arithmetic, ratio: target, limits, base } = wanted;
  const square = arithmetic.multiply(target, target);
  function* candidates(): Generator<Candidate> {
    for (const { n, d } of bestFractions(arithmetic, square, limits.denominator)) {
      if (n === d) continue;
      yield {
        family: 'root',
        form: { kind: 'root', of: fraction(n, d) },
        strikes: () => strikesOfRoot(n, d),
        how: () =>
          d === 1n
            ? `The root of ${n} times the ${base}, from a right triangle or as mean proportional.`
            : `The mean proportional of the ${base} and ${n}/${d} of it, by the semicircle.`,
        source: null,
      };
    }
  }
  return {
    family: 'root',
    candidates: candidates(),
    ranges: `roots of best fractions p/q, ${PATH}, with q up to ${limits.denominator}`,
  };
}

const SMALL_RADICAND = 200n;

/** √(n/d) as the mean proportional, or as √(nd)/d where nd is small. */
function strikesOfRoot(n: bigint, d: bigint) {
  const mean = meanProportional(n, d);
  return n * d > SMALL_RADICAND || isSquare(n * d)
    ? mean
    : cheapest(mean, surd(0n, 1n, rootOfWhole(n * d), d));
}

function isSquare(n: bigint): boolean {
  for (let root = 1n; root * root <= n; root += 1n) if (root * root === n) return true;
  return false;
}
