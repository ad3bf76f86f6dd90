import type { Engine, Num } from '../engine/index';
import { attemptOrFail } from './attempt';
import { type ErrorCode, fail } from './failure';
import { giveFigure } from './give-figure';
import { giveList } from './give-list';
import { findUnit } from './names';
import { type PiSum, asAlgebraic, decideByEnclosures, mapSum } from './pi-sum';
import type {
  AngleResult,
  Bare,
  DecimalResult,
  Exact,
  ItemResult,
  NumberResult,
  Omission,
} from './result';
import { OPEN_REACH, TRANSCENDENTAL_REACH, reachOfAngle, reachOfValue } from './reach';
import { cutSize } from './cut';
import { MOST_DIGITS, type Settings, type Step } from './settings';
import { inDegrees, inInches } from './parts-of-unit';
import { isSum } from './written';
import { type AngleValue, type NumberValue, type Value, isRealValue } from './values';

export type GivenSettings = Settings & { readonly stepLength: Step | null };

export type GivenNumber = Bare<NumberResult>;
export type GivenAngle = Bare<AngleResult>;

/** How the last and often longest part of giving a number is watched, and whether it is to be left out. */
export interface StructureWatch {
  /** Called when value, digits and cut size are there and degree, polynomial and tower come next. */
  readonly started: () => void;
  /** Why these three are to be left out, when they are. */
  readonly refused: { readonly code: ErrorCode; readonly message: string } | null;
}

/**
 * Writes a value out as the result schema has it, in the unit of the settings. Degree, minimal polynomial and tower
 * that go over a limit are left out and named; everything else that fails, fails the whole with a `Failure`. Each part
 * has a step budget of its own.
 */
export function giveValue(
  engine: Engine,
  value: Value,
  settings: GivenSettings,
  watch: StructureWatch,
): ItemResult {
  return sizesOf(engine, value, settings)(watch);
}

/** Works out all sizes at once, and leaves the structure of the numbers for later. */
function sizesOf(
  engine: Engine,
  value: Value,
  settings: GivenSettings,
): (watch: StructureWatch) => ItemResult {
  switch (value.kind) {
    case 'number':
      return sizesOfNumber(engine, value, settings);
    case 'angle': {
      const given = giveAngle(engine, value, settings);
      return () => given;
    }
    case 'list': {
      const items = value.items.map((item) => sizesOf(engine, item, settings));
      return (watch) => giveList(items.map((item) => item(watch)));
    }
    default:
      return (watch) =>
        giveFigure(engine, value, (part, isCut) => {
          const stepLength = isCut ? settings.stepLength : null;
          return sizesOfNumber(engine, part, { ...settings, stepLength })(watch);
        });
  }
}

function sizesOfNumber(
  engine: Engine,
  value: NumberValue,
  settings: GivenSettings,
): (watch: StructureWatch) => GivenNumber {
  const sum = attemptOrFail(engine, () => inUnit(engine, value, settings.unit));
  const algebraic = asAlgebraic(engine, sum);
  const real = isRealValue(engine, value);
  const { stepLength } = settings;
  const isLength = real && value.length === 1;
  const cut =
    isLength && stepLength !== null
      ? { cut: attemptOrFail(engine, () => cutSize(engine, value.sum, settings, stepLength)) }
      : {};
  const inches =
    isLength && (settings.unit === 'in' || settings.unit === 'ft')
      ? { inches: attemptOrFail(engine, () => inInches(engine, value.sum, settings.unit)) }
      : {};
  const common = {
    kind: 'number' as const,
    exact: attemptOrFail(engine, () => writeSum(engine, sum)),
    unit: unitName(settings.unit, value.length),
    real,
    decimal: attemptOrFail(engine, () => decimalOfSum(engine, sum, settings.digits)),
    ...cut,
    ...inches,
  };
  return (watch) =>
    algebraic === null
      ? {
          ...common,
          degree: null,
          minimalPolynomial: null,
          tower: null,
          reach: { ...TRANSCENDENTAL_REACH },
        }
      : { ...common, ...giveStructure(engine, algebraic, watch) };
}

function giveStructure(
  engine: Engine,
  value: Num,
  watch: StructureWatch,
): Pick<
  GivenNumber,
  'degree' | 'minimalPolynomial' | 'tower' | 'reach' | 'omitted' | 'partOfTurn'
> {
  const omitted: Omission[] = [];
  watch.started();
  const attempt = <T>(field: Omission['field'], work: () => T): T | null => {
    if (watch.refused !== null) {
      omitted.push({ field, ...watch.refused });
      return null;
    }
    const outcome = engine.attempt(work);
    if (outcome.kind === 'value') return outcome.value;
    omitted.push({ field, code: outcome.code, message: outcome.message });
    return null;
  };
  const degree = attempt('degree', () => engine.degree(value));
  const polynomial = attempt('minimalPolynomial', () =>
    engine.minimalPolynomial(value).map(String),
  );
  const tower = attempt('tower', () => engine.tower(value));
  const verdict = engine.attempt(() => reachOfValue(engine, value, tower?.length ?? null));
  const reach = verdict.kind === 'value' ? verdict.value : { ...OPEN_REACH };
  const part = engine.isReal(value) ? null : engine.attempt(() => engine.partOfTurn(value));
  const turn = part?.kind === 'value' ? part.value : null;
  return {
    ...(turn === null ? {} : { partOfTurn: `${turn.k}/${turn.n}` }),
    degree,
    minimalPolynomial: polynomial,
    tower,
    reach,
    ...(omitted.length > 0 ? { omitted } : {}),
  };
}

function giveAngle(engine: Engine, value: AngleValue, settings: GivenSettings): GivenAngle {
  return {
    kind: 'angle',
    exact: attemptOrFail(engine, () => writeAngle(engine, value.turns)),
    decimal: attemptOrFail(engine, () =>
      engine.decimal(engine.mul(value.turns, engine.integer(360n)), settings.digits),
    ),
    dms: attemptOrFail(engine, () => inDegrees(engine, value.turns)),
    reach: attemptOrFail(engine, () => reachOfAngle(engine, value.turns)),
  };
}

/** The number of units of the settings that a value in millimetres is. */
export function inUnit(engine: Engine, value: NumberValue, unit: Settings['unit']): PiSum {
  const word = findUnit(unit);
  if (word === undefined)
    throw new Error(`The unit "${unit}" of the settings is not in the name table.`);
  if (value.length === 0 || unit === 'mm') return value.sum;
  const factor = engine.pow(engine.rational(word.size.d, word.size.n), BigInt(value.length));
  return mapSum(engine, value.sum, (coefficient) => engine.mul(coefficient, factor));
}

export function unitName(unit: Settings['unit'], length: number): string | null {
  if (length === 0) return null;
  return length === 1 ? unit : `${unit}^${length}`;
}

/** An angle as a number of degrees where that is a whole number, else as a part of a turn. */
function writeAngle(engine: Engine, turns: Num): Exact {
  const degrees = engine.mul(turns, engine.integer(360n));
  if (engine.isInteger(degrees)) {
    const { text, tex } = engine.write(degrees);
    return { text: `${text} deg`, tex: `${tex}^{\\circ}`, staged: false };
  }
  const part = engine.asRational(turns);
  if (part === null) {
    const { text, tex, staged } = engine.write(degrees);
    return { text: `(${text}) deg`, tex: `\\left(${tex}\\right)^{\\circ}`, staged };
  }
  const [sign, size] = part.n < 0n ? ['-', -part.n] : ['', part.n];
  const text = size === 1n ? `${sign}turn/${part.d}` : `${sign}${size} turn/${part.d}`;
  return { text, tex: `${sign}\\frac{${size}}{${part.d}}\\,\\mathrm{turn}`, staged: false };
}

/** Text and TeX of a sum of multiples of powers of π, highest power first. */
export function writeSum(engine: Engine, sum: PiSum): Exact {
  const algebraic = asAlgebraic(engine, sum);
  if (algebraic !== null) return engine.write(algebraic);
  const terms = [...sum]
    .sort(([a], [b]) => b - a)
    .map(([exponent, coefficient]) => writeTerm(engine, exponent, coefficient));
  const join = (parts: readonly string[]): string =>
    parts.reduce((before, part) => before + (part.startsWith('-') ? part : `+${part}`));
  return {
    text: join(terms.map((term) => term.text)),
    tex: join(terms.map((term) => term.tex)),
    staged: terms.some((term) => term.staged),
  };
}

function writePowerOfPi(exponent: number): [text: string, tex: string] {
  if (exponent === 1) return ['pi', '\\pi'];
  if (exponent === 0.5) return ['sqrt(pi)', '\\sqrt{\\pi}'];
  if (Number.isInteger(exponent)) return [`pi^${exponent}`, `\\pi^{${exponent}}`];
  return [`pi^(${2 * exponent}/2)`, `\\pi^{${2 * exponent}/2}`];
}

function writeTerm(engine: Engine, exponent: number, coefficient: Num): Exact {
  const written = engine.write(coefficient);
  if (exponent === 0) return written;
  const [powerText, powerTex] = writePowerOfPi(exponent);
  const rational = engine.asRational(coefficient);
  if (rational?.d === 1n && (rational.n === 1n || rational.n === -1n)) {
    const sign = rational.n < 0n ? '-' : '';
    return { text: sign + powerText, tex: sign + powerTex, staged: false };
  }
  const compound = isSum(written.text);
  return {
    text: compound ? `(${written.text})*${powerText}` : `${written.text}*${powerText}`,
    tex: compound ? `\\left(${written.tex}\\right)${powerTex}` : `${written.tex}\\,${powerTex}`,
    staged: written.staged,
  };
}

/** Correctly rounded digits of a value that may have π in it; a transcendental value never ties and never ends. */
export function decimalOfSum(engine: Engine, sum: PiSum, digits: number): DecimalResult {
  const algebraic = asAlgebraic(engine, sum);
  if (algebraic !== null) return engine.decimal(algebraic, digits);
  const part = (take: (coefficient: Num) => Num): DecimalResult =>
    decimalOfReal(engine, mapSum(engine, sum, take), digits);
  const re = part((coefficient) => engine.re(coefficient));
  const im = [...sum.values()].every((coefficient) => engine.isReal(coefficient))
    ? null
    : part((coefficient) => engine.im(coefficient));
  return {
    re: re.re,
    im: im?.re ?? null,
    digits,
    terminates: re.terminates && (im?.terminates ?? true),
  };
}

function decimalOfReal(engine: Engine, sum: PiSum, digits: number): DecimalResult {
  const algebraic = asAlgebraic(engine, sum);
  if (algebraic !== null) return engine.decimal(algebraic, digits);
  if (digits > MOST_DIGITS)
    fail('limit-digits', `${digits} digits were asked for; the limit is ${MOST_DIGITS}.`);
  return decideByEnclosures(engine, sum, 64 + 4 * digits, ({ low, high }) => {
    const below = engine.decimal(low, digits);
    return below.re === engine.decimal(high, digits).re ? { ...below, terminates: false } : null;
  });
}
