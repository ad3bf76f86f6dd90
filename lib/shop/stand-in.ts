import { bitLength } from '../engine/integers';
import {
  type Candidate,
  DEFAULT_SEARCH,
  FAMILIES,
  type Family,
  type Search,
  type SearchLimits,
  type Wanted,
} from './candidate';
import { directedDecimal } from './decimals';
import { bisectionSearch } from './families/bisections';
import { classicalSearch } from './families/classical';
import { fractionSearch, rootSearch } from './families/fractions';
import { hypotenuseSearch } from './families/hypotenuses';
import { surdSearch } from './families/surds';
import { encloseForm, squareOf } from './form';
import { type Fraction, type Interval, IntervalArithmetic } from './interval';
import { type Closing, closeRing, closeRun } from './ring';
import { type Strikes, totalStrikes } from './strikes';

/**
 * A real number that can be enclosed as narrowly as one likes: low ≤ x·2^bits ≤ high, with high - low small and staying
 * so as `bits` grows.
 */
export interface Target {
  enclose(bits: number): Interval;
}

/** What is asked. Lengths are all in one unit; an angle is in turns. */
export interface StandInRequest {
  readonly target: Target;
  /** Greatest error allowed, above 0. */
  readonly tolerance: Fraction;
  /** `length` also stands for plain numbers. An angle has neither radius nor ring. */
  readonly measure: 'length' | 'angle';
  /** The segment that constructions start from, and the radius of the ring; without it the unit of measure is taken. */
  readonly radius?: Target | undefined;
  /** Parts of the ring (with a radius) or of the straight run (without one) that the value is stepped round. */
  readonly parts?: number | undefined;
}

/** The interval low/2^bits … high/2^bits. */
export interface Enclosed extends Interval {
  readonly bits: number;
}

/** A constructible number in the place of the target, with all that is needed to judge it. */
export interface StandIn extends Pick<Candidate, 'family' | 'form' | 'source'> {
  readonly strikes: Strikes;
  readonly how: string;
  /** Stand-in less target. */
  readonly error: Enclosed & {
    /** Size of the error, rounded up to 12 significant digits. */
    readonly bound: string;
    /** `level` when not even `bits` binary places tell the two apart: the target itself, or next to it. */
    readonly direction: 'above' | 'below' | 'level';
  };
  /** Simplicity: the sum of the counts of strikes. */
  readonly simplicity: number;
  readonly closing: Judged | null;
}

/** A closing in `bits` binary places, and whether every length in it keeps to the tolerance as well. */
export type Judged = Closing & { readonly bits: number; readonly inside: boolean };

/** What was looked at in one family. */
export interface Coverage {
  readonly family: Family;
  readonly ranges: string;
  readonly examined: number;
  readonly inside: number;
  /** Whether the ranges were gone through; false when the limit on candidates ended the search. */
  readonly complete: boolean;
}

export type StandInAnswer =
  | {
      readonly kind: 'found';
      /**
       * Cheapest first; each further one is dearer and closer than all before it. At least one. Where a number of parts
       * was given, those whose stepped ring keeps to the tolerance come first in that order, the others after them.
       */
      readonly offers: readonly [StandIn, ...StandIn[]];
      readonly covered: readonly Coverage[];
    }
  | {
      readonly kind: 'none-inside';
      readonly nearest: StandIn | null;
      readonly covered: readonly Coverage[];
    }
  | { readonly kind: 'not-positive' }
  | {
      readonly kind: 'over-limit';
      readonly limit: 'bits';
      readonly allowed: number;
      readonly met: number;
    };

const DIGITS = 12;

/** Binary places beyond the size of the tolerance with which candidates are weighed. */
const GUARD = 96;

interface Weighed {
  readonly candidate: Candidate;
  readonly simplicity: number;
  readonly size: Interval;
}

/**
 * Looks for constructible numbers within a tolerance of a positive target.
 * Accepts any real target that can be enclosed; it need not be algebraic. Keeps: a candidate counts as inside only when
 * its whole error interval is; nothing rests on floating point. Of the candidates inside, those stay that no other one
 * beats in strikes and error at once, cheapest first, equals in the order of the families; with a number of parts that
 * is done first among those that keep inside when stepped round. Deterministic.
 * Cost: a handful of products of a few hundred bits for each candidate; the number of candidates is limited.
 * Throws a RangeError for a tolerance, number of parts or limit that makes no sense.
 */
export function findStandIns(
  request: StandInRequest,
  options: Partial<SearchLimits> = {},
): StandInAnswer {
  const limits: SearchLimits = { ...DEFAULT_SEARCH, ...options };
  checkRequest(request, limits);
  const { tolerance } = request;
  const fine = Math.max(0, bitLength(tolerance.d) - bitLength(tolerance.n));
  const bits = fine + GUARD;
  if (bits > limits.bits)
    return { kind: 'over-limit', limit: 'bits', allowed: limits.bits, met: bits };
  const scale = scaleOf(request, bits);
  if (scale === null) return { kind: 'not-positive' };
  const { arithmetic } = scale;
  const wanted: Wanted = {
    arithmetic,
    ratio: scale.ratio,
    base: request.radius === undefined ? 'unit' : 'radius',
    parts: request.measure === 'length' ? (request.parts ?? null) : null,
    limits,
  };
  const allowed = arithmetic.fraction(tolerance).low;
  const inside: Weighed[] = [];
  let nearest: Weighed | null = null;
  const covered = searchesFor(request, wanted).map((search): Coverage => {
    let [examined, found, complete] = [0, 0, true];
    for (const candidate of search.candidates) {
      if (examined === limits.candidates) {
        complete = false;
        break;
      }
      examined += 1;
      const value = arithmetic.multiply(encloseForm(arithmetic, candidate.form), scale.base);
      const size = arithmetic.size(arithmetic.subtract(value, scale.target));
      const isInside = size.high <= allowed;
      if (!isInside && nearest !== null && size.high >= nearest.size.high) continue;
      const weighed = { candidate, simplicity: totalStrikes(candidate.strikes()), size };
      if (nearest === null || size.high < nearest.size.high) nearest = weighed;
      if (!isInside) continue;
      found += 1;
      inside.push(weighed);
    }
    return { family: search.family, ranges: search.ranges, examined, inside: found, complete };
  });
  const judge = (weighed: Weighed): StandIn =>
    judgeStandIn(request, weighed, bits, Math.min(4 * bits, limits.bits));
  const [first, ...others] = ordered(request, scale, inside, limits.offers).map(judge);
  if (first === undefined) {
    const closest = nearest as Weighed | null;
    return { kind: 'none-inside', nearest: closest === null ? null : judge(closest), covered };
  }
  return { kind: 'found', offers: [first, ...others], covered };
}

/** Of the offers that leave the tolerance when stepped round, this many are kept a place behind the others. */
const FLAGGED = 2;

/** At most `most` offers in their order: with a number of parts, those that keep inside when stepped round go first. */
function ordered(
  request: StandInRequest,
  scale: Scale,
  inside: readonly Weighed[],
  most: number,
): Weighed[] {
  const all = mergeEquals(inside);
  const cheapest = front(all);
  if (request.parts === undefined) return cheapest.slice(0, most);
  const { arithmetic, base, target } = scale;
  const allowed = arithmetic.fraction(request.tolerance).low;
  const closes = ({ candidate }: Weighed): boolean => {
    const form = encloseForm(arithmetic, candidate.form);
    const error = arithmetic.subtract(arithmetic.multiply(form, base), target);
    const closing = closingOf(request, scale, form, error);
    return closing !== null && keepsTo(closing, arithmetic, allowed);
  };
  const closing = front(all, closes);
  const others = cheapest.filter((weighed) => !closing.includes(weighed));
  const kept = closing.slice(0, Math.max(1, most - Math.min(FLAGGED, others.length)));
  return [...kept, ...others].slice(0, most);
}

function checkRequest({ tolerance, measure, radius, parts }: StandInRequest, limits: SearchLimits) {
  if (tolerance.n <= 0n || tolerance.d <= 0n) throw new RangeError('A tolerance must be positive.');
  if (measure === 'angle' && (radius !== undefined || parts !== undefined))
    throw new RangeError('A stand-in for an angle takes neither radius nor parts.');
  if (parts !== undefined && (!Number.isSafeInteger(parts) || parts < 2 || parts > 1_000_000))
    throw new RangeError('The number of parts must be a whole number from 2 to 1000000.');
  for (const [name, value] of Object.entries(limits)) {
    if (!Number.isSafeInteger(value) || (value as number) < 1)
      throw new RangeError(`The limit ${name} must be a positive integer.`);
  }
}

interface Scale {
  readonly arithmetic: IntervalArithmetic;
  readonly target: Interval;
  readonly base: Interval;
  readonly ratio: Interval;
}

/** Target and base in one arithmetic; null when the target, or the radius, is not seen to lie above 0. */
function scaleOf({ target, radius }: StandInRequest, bits: number): Scale | null {
  const arithmetic = new IntervalArithmetic(bits);
  const wanted = target.enclose(bits);
  const base = radius?.enclose(bits) ?? { low: arithmetic.one, high: arithmetic.one };
  if (wanted.low <= 0n || base.low <= 0n) return null;
  return { arithmetic, target: wanted, base, ratio: arithmetic.divide(wanted, base) };
}

function searchesFor({ measure }: StandInRequest, wanted: Wanted): Search[] {
  if (measure === 'angle') return [bisectionSearch(wanted, 'angle')];
  return [
    fractionSearch(wanted),
    rootSearch(wanted),
    hypotenuseSearch(wanted),
    surdSearch(wanted),
    bisectionSearch(wanted, 'chord'),
    classicalSearch(wanted),
  ];
}

/** One number that several families found stays once: by its cheapest way, with the source that any of them named. */
function mergeEquals(all: readonly Weighed[]): Weighed[] {
  const bySquare = new Map<string, Weighed>();
  const others: Weighed[] = [];
  for (const weighed of all) {
    const square = squareOf(weighed.candidate.form);
    if (square === null) {
      others.push(weighed);
      continue;
    }
    const key = `${square.n}/${square.d}`;
    const before = bySquare.get(key);
    if (before === undefined) {
      bySquare.set(key, weighed);
      continue;
    }
    const cheaper = weighed.simplicity < before.simplicity ? weighed : before;
    const source = before.candidate.source ?? weighed.candidate.source;
    bySquare.set(key, { ...cheaper, candidate: { ...cheaper.candidate, source } });
  }
  return [...bySquare.values(), ...others];
}

const rank = ({ candidate }: Weighed): number => FAMILIES.indexOf(candidate.family);
const order = (a: bigint, b: bigint): number => (a < b ? -1 : a > b ? 1 : 0);

/**
 * Of those that pass, the ones that no other beats in strikes and error at once, fewest strikes first and so with falling
 * error. Only those that would be kept are put to the test.
 */
function front(
  all: readonly Weighed[],
  passes: (weighed: Weighed) => boolean = () => true,
): Weighed[] {
  const sorted = [...all].sort(
    (a, b) => a.simplicity - b.simplicity || order(a.size.high, b.size.high) || rank(a) - rank(b),
  );
  const kept: Weighed[] = [];
  for (const weighed of sorted) {
    const best = kept.at(-1);
    if (best !== undefined && weighed.size.high >= best.size.low) continue;
    if (passes(weighed)) kept.push(weighed);
  }
  return kept;
}

/** Error and closing with as many binary places as are needed to tell the side, up to the limit. */
function judgeStandIn(
  request: StandInRequest,
  { candidate, simplicity }: Weighed,
  startBits: number,
  mostBits: number,
): StandIn {
  for (let bits = startBits; ; bits *= 2) {
    const places = Math.min(bits, mostBits);
    const scale = scaleOf(request, places);
    if (scale === null) throw new Error('A target above 0 was enclosed below it.');
    const { arithmetic, base, target } = scale;
    const form = encloseForm(arithmetic, candidate.form);
    const error = arithmetic.subtract(arithmetic.multiply(form, base), target);
    const direction = error.low > 0n ? 'above' : error.high < 0n ? 'below' : 'level';
    // Twelve digits of the bound want the interval to be narrow beside the error itself.
    const clear = (error.high - error.low) << 48n <= arithmetic.size(error).low;
    if (!clear && places < mostBits) continue;
    const closing = closingOf(request, scale, form, error);
    const inside =
      closing !== null && keepsTo(closing, arithmetic, arithmetic.fraction(request.tolerance).low);
    return {
      family: candidate.family,
      form: candidate.form,
      source: candidate.source,
      strikes: candidate.strikes(),
      how: candidate.how(),
      simplicity,
      error: {
        ...error,
        bits: places,
        direction,
        bound: boundOf({ ...error, bits: places }, { n: 1n, d: 1n }),
      },
      closing: closing === null ? null : { ...closing, bits: places, inside },
    };
  }
}

function closingOf(
  { measure, radius, parts }: StandInRequest,
  { arithmetic, base }: Scale,
  form: Interval,
  error: Interval,
): Closing | null {
  if (parts === undefined || measure === 'angle') return null;
  if (radius === undefined) return closeRun(arithmetic, error, parts);
  return parts < 3 ? null : closeRing({ arithmetic, radius: base, opening: form, parts });
}

function keepsTo(closing: Closing, arithmetic: IntervalArithmetic, allowed: bigint): boolean {
  const lengths =
    closing.kind === 'run' ? [closing.run] : [closing.miss, closing.last, closing.worst];
  return lengths.every((length) => arithmetic.size(length).high <= allowed);
}

/** The size of an error times a factor, rounded up to 12 significant digits. */
export function boundOf(error: Enclosed, factor: Fraction): string {
  const size = -error.low > error.high ? -error.low : error.high;
  return directedDecimal({ n: size * factor.n, d: factor.d << BigInt(error.bits) }, DIGITS, 'up');
}

/** An interval times a factor above 0 as two decimals of 12 significant digits, rounded outwards. */
export function decimalsOf(
  { low, high, bits }: Enclosed,
  factor: Fraction = { n: 1n, d: 1n },
): { low: string; high: string } {
  const d = factor.d << BigInt(bits);
  return {
    low: directedDecimal({ n: low * factor.n, d }, DIGITS, 'down'),
    high: directedDecimal({ n: high * factor.n, d }, DIGITS, 'up'),
  };
}
