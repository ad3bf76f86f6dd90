import type { Engine, Num } from '../../engine/index';
import {
  type Enclosed,
  type Family,
  type Fraction,
  type Interval,
  type Judged,
  type StandIn,
  type StandInAnswer,
  type Target,
  boundOf,
  buildForm,
  decimalsOf,
  findStandIns,
  writeScaled,
  writeStrikes,
  writeTimes,
} from '../../shop/index';
import { fail } from '../failure';
import { type GivenSettings, inUnit, unitName, writeSum } from '../give-value';
import { findUnit } from '../names';
import { type PiSum, asAlgebraic, enclose, mapSum } from '../pi-sum';
import type { StandInOffer, StandInResult, SteppedResult } from '../result';
import {
  type NumberValue,
  type Magnitude,
  type Single,
  angle,
  describe,
  isRealValue,
  needNumber,
  needMagnitude,
  number,
  signOf,
} from '../values';

type Found = Extract<StandInAnswer, { kind: 'found' }>;

/** What a stand-in is a stand-in for, kept beside its value until the result is written. */
interface Standing {
  readonly found: Found;
  /** Which of the offers the value is; those before it went over a limit of the engine. */
  readonly chosen: number;
  /** Whether the closest offer is the value itself; the search alone cannot tell. */
  readonly exact: boolean;
  readonly of: Magnitude;
  readonly tolerance: Magnitude;
  readonly radius: NumberValue | null;
}

type StandInValue = Magnitude & { readonly standing: Standing };

/**
 * `standin(value, tolerance, R, n)`: the cheapest constructible value within the tolerance, exact, of the same kind; with
 * n, the cheapest whose ring of n steps keeps to the tolerance too, where there is one.
 * Accepts a positive real number of any unit, or a positive angle; a tolerance of the same kind that is rational and
 * above 0; for numbers a radius that constructions start from and the number of parts it is stepped round. Fails with
 * `unit-mismatch`, `domain`, and `not-exact` when nothing was found inside the tolerance.
 */
export function standIn(engine: Engine, args: readonly Single[]): Single {
  const [given, off, radius, parts] = args as [Single, Single, Single?, Single?];
  const value = needMagnitude(given, 'standin needs a number or an angle');
  const tolerance = needMagnitude(off, 'standin needs a tolerance that is a number or an angle');
  checkKinds(engine, value, tolerance, radius);
  const base = radius === undefined ? null : needNumber(radius, 'standin needs a radius');
  const allowed = toleranceOf(engine, tolerance);
  const answer = findStandIns({
    target: targetOf(engine, value),
    tolerance: allowed,
    measure: value.kind === 'angle' ? 'angle' : 'length',
    radius: base === null ? undefined : targetOf(engine, base),
    parts: parts === undefined ? undefined : partsOf(engine, parts),
  });
  const standing = { of: value, tolerance, radius: base };
  switch (answer.kind) {
    case 'found':
      return choose(engine, answer, standing);
    case 'none-inside':
      return failNearest(engine, answer, standing);
    case 'not-positive':
      return fail('limit-digits', 'standin needs a value that is seen to lie above 0.');
    case 'over-limit':
      return fail(
        'limit-digits',
        `A tolerance this fine needs ${answer.met} binary digits; the limit is ${answer.allowed}.`,
      );
  }
}

function checkKinds(
  engine: Engine,
  value: Magnitude,
  tolerance: Magnitude,
  radius: Single | undefined,
): void {
  const others = [
    ['tolerance', tolerance],
    ['radius', radius],
  ] as const;
  for (const [name, other] of others) {
    if (other === undefined) continue;
    if (name === 'radius' && value.kind === 'angle')
      fail('unit-mismatch', 'standin of an angle takes a tolerance only; a radius was given too.');
    const same =
      other.kind === 'angle' || value.kind === 'angle'
        ? other.kind === value.kind
        : other.length === value.length;
    if (!same)
      fail(
        'unit-mismatch',
        `standin needs a ${name} of the kind of the value, which is ${describe(value)}; this one is ${describe(other)}.`,
      );
  }
  for (const [name, each] of [['value', value], ...others] as const) {
    if (each === undefined) continue;
    if (!isRealValue(engine, each))
      fail('domain', `standin needs a ${name} that is real, and this one is not.`);
    if (signOf(engine, each) <= 0)
      fail('domain', `standin needs a ${name} above 0, and this one is not.`);
  }
}

function toleranceOf(engine: Engine, tolerance: Magnitude): Fraction {
  const plain = tolerance.kind === 'angle' ? tolerance.turns : asAlgebraic(engine, tolerance.sum);
  const fraction = plain === null ? null : engine.asRational(plain);
  return (
    fraction ??
    fail('domain', 'standin needs a rational tolerance, such as 0.2 mm; this one is irrational.')
  );
}

const MOST_PARTS = 1_000_000n;

function partsOf(engine: Engine, parts: Single): number {
  const count =
    parts.kind === 'number' && parts.length === 0 ? asAlgebraic(engine, parts.sum) : null;
  const whole = count === null ? null : engine.asRational(count);
  if (whole === null || whole.d !== 1n || whole.n < 3n || whole.n > MOST_PARTS)
    return fail(
      'domain',
      `standin needs a whole number of parts from 3 to ${MOST_PARTS} as its fourth argument.`,
    );
  return Number(whole.n);
}

/** Encloses a positive real value, in millimetres to its power or in turns, by whole parts of 2^bits. */
function targetOf(engine: Engine, value: Magnitude): Target {
  const known = new Map<number, Interval>();
  const floorOf = (real: Num, bits: number): bigint =>
    engine.floor(engine.mul(real, engine.integer(1n << BigInt(bits))));
  const find = (bits: number): Interval => {
    const algebraic = value.kind === 'angle' ? value.turns : asAlgebraic(engine, value.sum);
    if (algebraic !== null) {
      const low = floorOf(algebraic, bits);
      return { low, high: low + 1n };
    }
    // Large factors of π widen the enclosure, so guard bits are added until it is as narrow as is promised.
    for (let guard = 8; ; guard *= 2) {
      const ends = enclose(engine, (value as NumberValue).sum, bits + guard);
      const [low, high] = [floorOf(ends.low, bits), floorOf(ends.high, bits) + 1n];
      if (high - low <= 2n) return { low, high };
    }
  };
  return {
    enclose(bits) {
      const interval = known.get(bits) ?? find(bits);
      known.set(bits, interval);
      return interval;
    },
  };
}

/** The first offer that the engine can hold, which is nearly always the first. */
function choose(
  engine: Engine,
  found: Found,
  { of, tolerance, radius }: Omit<Standing, 'found' | 'chosen' | 'exact'>,
): StandInValue {
  for (const [chosen, offer] of found.offers.entries()) {
    const built = engine.attempt(() => buildForm(engine, offer.form));
    if (built.kind !== 'value') continue;
    const value = inPlaceOf(engine, of, built.value, radius);
    const exact = isExact(engine, found, of, radius);
    return { ...value, standing: { found, chosen, exact, of, tolerance, radius } };
  }
  return fail(
    'limit-size',
    `All ${found.offers.length} stand-ins inside the tolerance are too large to be held exactly.`,
  );
}

/** Only the closest offer can be level with the value. */
function isExact(
  engine: Engine,
  { offers }: Found,
  of: Magnitude,
  radius: NumberValue | null,
): boolean {
  const closest = offers.find(({ error }) => error.direction === 'level');
  if (closest === undefined) return false;
  const same = engine.attempt(() =>
    sameValue(engine, inPlaceOf(engine, of, buildForm(engine, closest.form), radius), of),
  );
  return same.kind === 'value' && same.value;
}

function inPlaceOf(
  engine: Engine,
  of: Magnitude,
  form: Num,
  radius: NumberValue | null,
): Magnitude {
  if (of.kind === 'angle') return angle(form);
  const sum: PiSum =
    radius === null
      ? new Map([[0, form]])
      : mapSum(engine, radius.sum, (coefficient) => engine.mul(coefficient, form));
  return number(sum, of.length);
}

function sameValue(engine: Engine, a: Magnitude, b: Magnitude): boolean {
  if (a.kind === 'angle') return b.kind === 'angle' && engine.equal(a.turns, b.turns);
  if (b.kind === 'angle') return false;
  const [x, y] = [asAlgebraic(engine, a.sum), asAlgebraic(engine, b.sum)];
  return x !== null && y !== null && engine.equal(x, y);
}

function failNearest(
  engine: Engine,
  answer: Extract<StandInAnswer, { kind: 'none-inside' }>,
  { of, radius }: Pick<Standing, 'of' | 'radius'>,
): never {
  const looked = answer.covered.reduce((sum, { examined }) => sum + examined, 0);
  const begin = `None of the ${looked} stand-ins looked at lies inside the tolerance`;
  const { nearest } = answer;
  if (nearest === null) return fail('not-exact', `${begin}, and none is near.`);
  const unit =
    of.kind === 'angle' ? ' deg' : of.length === 0 ? '' : ` ${unitName('mm', of.length)}`;
  const bound = boundOf(nearest.error, of.kind === 'angle' ? { n: 360n, d: 1n } : { n: 1n, d: 1n });
  const side = nearest.error.direction === 'below' ? 'below' : 'above';
  return fail(
    'not-exact',
    `${begin}; the nearest, \`${writeOffer(engine, nearest, of, radius)}\`, is ${bound}${unit} ${side} the value.`,
  );
}

/** The offer in the cell language: with a rational radius in its units, else as a multiple of the radius. */
function writeOffer(
  engine: Engine,
  { form }: StandIn,
  of: Single,
  radius: NumberValue | null,
): string {
  if (of.kind === 'angle') {
    if (form.kind !== 'fraction')
      throw new Error('An angle has only parts of a turn as stand-ins.');
    const count = form.n === 1n ? 'turn' : `${form.n} turn`;
    return form.d === 1n ? count : `${count}/${form.d}`;
  }
  const unit = unitName('mm', of.length);
  const plain = radius === null ? null : asAlgebraic(engine, radius.sum);
  const base = radius === null ? { n: 1n, d: 1n } : plain && engine.asRational(plain);
  if (base !== null) return writeScaled(form, base, unit);
  const written = `(${writeSum(engine, (radius as NumberValue).sum).text})`;
  return writeTimes(unit === null ? written : `${written} ${unit}`, form);
}

/** The addition to the result of a value that `standin` gave; nothing for all other values. */
export function giveStandIn(
  engine: Engine,
  value: Single,
  settings: GivenSettings,
): { standIn?: StandInResult } {
  if (!('standing' in value)) return {};
  const { found, chosen, exact, of, tolerance, radius } = (value as StandInValue).standing;
  const factor = factorTo(settings.unit, of);
  const give = (offer: StandIn): StandInOffer => ({
    text: writeOffer(engine, offer, of, radius),
    family: offer.family satisfies Family,
    how: offer.how,
    source: offer.source,
    error:
      exact && offer.error.direction === 'level'
        ? { bound: '0', direction: 'exact' }
        : { bound: boundOf(offer.error, factor), direction: offer.error.direction },
    strikes: { total: offer.simplicity, counts: writeStrikes(offer.strikes) },
    stepped: offer.closing === null ? null : giveStepped(offer.closing, factor),
  });
  const offer = found.offers[chosen] as StandIn;
  return {
    standIn: {
      of: writeWhole(engine, of, settings),
      tolerance: writeWhole(engine, tolerance, settings),
      ...give(offer),
      covered: found.covered.map((part) => ({ ...part })),
      others: found.offers.filter((_, index) => index !== chosen).map(give),
    },
  };
}

function giveStepped(closing: Judged, factor: Fraction): SteppedResult {
  const { bits, parts, inside } = closing;
  const give = (interval: Interval, by: Fraction) => {
    const enclosed: Enclosed = { ...interval, bits };
    return decimalsOf(enclosed, by);
  };
  return closing.kind === 'run'
    ? { kind: 'run', parts, inside, run: give(closing.run, factor) }
    : {
        kind: 'ring',
        parts,
        inside,
        gap: give(closing.gap, { n: 1n, d: 1n }),
        miss: give(closing.miss, factor),
        last: give(closing.last, factor),
        worst: give(closing.worst, factor),
      };
}

/** From millimetres to a power to the unit of the settings, or from turns to degrees. */
function factorTo(unit: GivenSettings['unit'], of: Magnitude): Fraction {
  if (of.kind === 'angle') return { n: 360n, d: 1n };
  const word = findUnit(unit);
  if (word === undefined)
    throw new Error(`The unit "${unit}" of the settings is not in the name table.`);
  const power = BigInt(Math.abs(of.length));
  const [n, d] = [word.size.d ** power, word.size.n ** power];
  return of.length >= 0 ? { n, d } : { n: d, d: n };
}

/** A value with its unit, so that it parses back. */
function writeWhole(engine: Engine, value: Magnitude, settings: GivenSettings): string {
  if (value.kind === 'angle') return `(${engine.write(value.turns).text}) turn`;
  const { text } = writeSum(engine, inUnit(engine, value, settings.unit));
  const unit = unitName(settings.unit, value.length);
  return unit === null
    ? text
    : /^\d+(\/\d+)?$/.test(text)
      ? `${text} ${unit}`
      : `(${text}) ${unit}`;
}
