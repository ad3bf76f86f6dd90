/**
 * Counts of strikes after Lemoine's geometrography (1888; symbols as in Weisstein, "Geometrography"): S1 the edge put to
 * a point, S2 a line drawn, C1 a compass point put on a given point, C2 on any point of a line, C3 a circle drawn. Their
 * sum is the simplicity of a construction.
 *
 * Given, and not counted: the base (the radius, or the unit of measure) as a segment AB on a line that runs on, and for
 * divisions of the circle the circle of that radius about a marked centre with one marked point. Taking up the result in
 * the compass is not counted either, as it is the same for all. A free opening or direction costs nothing beyond the
 * strike that uses it. The counts are those of the simple constructions told here, not the least that are possible.
 */
export interface Strikes {
  readonly s1: number;
  readonly s2: number;
  readonly c1: number;
  readonly c2: number;
  readonly c3: number;
}

const strikes = (s1: number, s2: number, c1: number, c2: number, c3: number): Strikes => ({
  s1,
  s2,
  c1,
  c2,
  c3,
});

export const NONE = strikes(0, 0, 0, 0, 0);
/** A line through two points. */
export const LINE = strikes(2, 1, 0, 0, 0);
/** A line of free direction through one point. */
const RAY = strikes(1, 1, 0, 0, 0);
/** A circle about a point through a point. */
export const CIRCLE = strikes(0, 0, 2, 0, 1);
/** A circle about a point with the opening that the compass has. */
export const REPEAT = strikes(0, 0, 1, 0, 1);
/** A circle about a point with an opening taken between two others. */
export const TRANSFER = strikes(0, 0, 3, 0, 1);
/** The perpendicular bisector of two points: two circles of one free opening and a line. */
export const BISECTOR = strikes(2, 1, 2, 0, 2);
/** The perpendicular to a line in one of its points: a circle through it about a free centre, a diameter, a line. */
export const PERPENDICULAR = strikes(4, 2, 1, 0, 1);
/** The parallel to a line through a point, by two opposite sides of a parallelogram. */
const PARALLEL = sumStrikes(TRANSFER, TRANSFER, LINE);

export function sumStrikes(...parts: readonly Strikes[]): Strikes {
  return parts.reduce(
    (a, b) => strikes(a.s1 + b.s1, a.s2 + b.s2, a.c1 + b.c1, a.c2 + b.c2, a.c3 + b.c3),
    NONE,
  );
}

export function timesStrikes(part: Strikes, count: number): Strikes {
  return strikes(
    part.s1 * count,
    part.s2 * count,
    part.c1 * count,
    part.c2 * count,
    part.c3 * count,
  );
}

/** The simplicity: the number of strikes of all sorts. */
export const totalStrikes = ({ s1, s2, c1, c2, c3 }: Strikes): number => s1 + s2 + c1 + c2 + c3;

/** For instance `4S1+2S2+7C1+5C3`; `0` when nothing is to be done. */
export function writeStrikes({ s1, s2, c1, c2, c3 }: Strikes): string {
  const terms = [
    [s1, 'S1'],
    [s2, 'S2'],
    [c1, 'C1'],
    [c2, 'C2'],
    [c3, 'C3'],
  ] as const;
  const written = terms
    .filter(([count]) => count > 0)
    .map(([count, symbol]) => (count === 1 ? symbol : `${count}${symbol}`));
  return written.length === 0 ? '0' : written.join('+');
}

/** The cheapest of several ways; the first of equals. */
export function cheapest(first: Strikes, ...others: readonly Strikes[]): Strikes {
  return others.reduce((best, way) => (totalStrikes(way) < totalStrikes(best) ? way : best), first);
}

/** From one part to p of them on its line by binary doubling: a circle doubles, a transferred opening adds one. */
function byDoubling(p: bigint): Strikes {
  const binary = p.toString(2);
  const ones = binary.replaceAll('0', '').length;
  return sumStrikes(timesStrikes(CIRCLE, binary.length - 1), timesStrikes(TRANSFER, ones - 1));
}

/** p times a segment that is there, p ≥ 1: stepped with one opening, or doubled. */
export function multiple(p: bigint): Strikes {
  if (p === 1n) return NONE;
  const doubled = byDoubling(p);
  if (p > 1000n) return doubled;
  const stepped = sumStrikes(CIRCLE, timesStrikes(REPEAT, Number(p) - 2));
  return cheapest(stepped, doubled);
}

/** p/q of a segment by the intercept theorem: equal parts on a free ray, a line to the end, a parallel to it. */
function byIntercept(p: bigint, q: bigint): Strikes {
  const most = p > q ? p : q;
  const doubled = sumStrikes(REPEAT, byDoubling(p), byDoubling(q));
  const ticks = most > 1000n ? doubled : cheapest(timesStrikes(REPEAT, Number(most)), doubled);
  return sumStrikes(RAY, ticks, LINE, PARALLEL);
}

/** The q-th part of a segment: halved again and again where q is a power of two, else by the intercept theorem. */
export function divide(q: bigint): Strikes {
  if (q === 1n) return NONE;
  const halvings = q.toString(2).length - 1;
  const cut = byIntercept(1n, q);
  return q === 1n << BigInt(halvings) ? cheapest(timesStrikes(BISECTOR, halvings), cut) : cut;
}

/** p/q of the base, p/q in lowest terms. */
export function ratio(p: bigint, q: bigint): Strikes {
  if (q === 1n) return multiple(p);
  return cheapest(byIntercept(p, q), sumStrikes(divide(q), multiple(p)));
}

/** The hypotenuse over legs of p and q of the d parts of the base. */
export function hypotenuse(p: bigint, q: bigint, d: bigint): Strikes {
  const legs = p === q ? NONE : multiple(q);
  return sumStrikes(divide(d), PERPENDICULAR, multiple(p), CIRCLE, legs);
}

/** Altitude theorem: the base laid off the other way, the middle, the semicircle, the perpendicular. */
const MEAN = sumStrikes(CIRCLE, BISECTOR, CIRCLE, PERPENDICULAR);

/** √(p/q) of the base: the mean proportional of the base and p/q of it. */
export const meanProportional = (p: bigint, q: bigint): Strikes => sumStrikes(ratio(p, q), MEAN);

/** √c of the base for a whole c that is no square: cheapest of two crossing circles for 3, a hypotenuse, a leg, a mean. */
export function rootOfWhole(c: bigint): Strikes {
  const ways = [meanProportional(c, 1n)];
  if (c === 3n) ways.push(sumStrikes(CIRCLE, REPEAT));
  for (let p = 1n; p * p < c; p += 1n)
    for (let q = 1n; q <= p; q += 1n) if (p * p + q * q === c) ways.push(hypotenuse(p, q, 1n));
  // c = h² - l² with h - l = 1 or 2 and so on: a perpendicular at the end of l, and an arc of radius h.
  for (let apart = 1n; apart * apart < c; apart += 1n) {
    if (c % apart !== 0n || (c / apart + apart) % 2n !== 0n) continue;
    const long = (c / apart + apart) / 2n;
    ways.push(sumStrikes(multiple(long - apart), PERPENDICULAR, multiple(long), CIRCLE));
  }
  return cheapest(...(ways as [Strikes, ...Strikes[]]));
}

/** (a + b√c)/d of the base: the root, its multiple, the multiple of the base put to it, the d-th part of the whole. */
export function surd(a: bigint, b: bigint, root: Strikes, d: bigint): Strikes {
  const size = (n: bigint): bigint => (n < 0n ? -n : n);
  const added = a === 0n ? NONE : sumStrikes(multiple(size(a)), TRANSFER);
  return sumStrikes(root, multiple(size(b)), added, divide(d));
}
