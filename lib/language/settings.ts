import type { Rounding } from '../engine/index';
import { fractionOfLiteral, gcd } from './decimals';
import { findUnit } from './names';
import { readLine } from './read';

export type LengthUnit = 'mm' | 'cm' | 'm' | 'in' | 'ft';

/** How results are given. `step` is a length such as `0.5 mm` or `1/64 in`, or null for no cut sizes. */
export interface Settings {
  digits: number;
  unit: LengthUnit;
  step: string | null;
  rounding: Rounding;
}

export const DEFAULT_SETTINGS: Readonly<Settings> = Object.freeze({
  digits: 30,
  unit: 'mm',
  step: null,
  rounding: 'half-even',
});

export const LENGTH_UNITS: readonly LengthUnit[] = ['mm', 'cm', 'm', 'in', 'ft'];
export const ROUNDINGS: readonly Rounding[] = ['half-even', 'half-up', 'up', 'down'];
export const MOST_DIGITS = 10_000;

/** A cutting step in millimetres, as a reduced fraction above 0. */
export interface Step {
  readonly n: bigint;
  readonly d: bigint;
}

export type StepReading =
  | { readonly kind: 'step'; readonly step: Step }
  | { readonly kind: 'problem'; readonly message: string };

/** Reads a cutting step: a positive decimal or fraction with a unit of length. Never throws. */
export function readStep(text: string): StepReading {
  const problem = (message: string): StepReading => ({ kind: 'problem', message });
  if (text.length > 100)
    return problem(
      'The step is longer than 100 characters; a length such as `0.5 mm` was expected.',
    );
  const reading = readLine(text);
  const value =
    reading.kind === 'statement' && reading.statement.kind === 'value'
      ? reading.statement.value
      : null;
  if (value === null || value.kind !== 'quantity' || value.unit.kind !== 'unit') {
    return problem(
      `The step is \`${text}\`; a length such as \`0.5 mm\` or \`1/64 in\` was expected.`,
    );
  }
  const unit = findUnit(value.unit.name);
  if (unit?.of !== 'length')
    return problem(`The step is \`${text}\`; a unit of length was expected.`);
  const over = fractionOfLiteral(value.numerator.text);
  const under =
    value.denominator === null ? { n: 1n, d: 1n } : fractionOfLiteral(value.denominator.text);
  const n = over.n * under.d * unit.size.n;
  const d = over.d * under.n * unit.size.d;
  if (n === 0n || d === 0n)
    return problem(`The step is \`${text}\`; a length above 0 was expected.`);
  const common = gcd(n, d);
  return { kind: 'step', step: { n: n / common, d: d / common } };
}

/**
 * Fills in what is not given and checks the rest. Throws a RangeError for settings that callers should have refused:
 * requests from outside are checked by the evaluation schema before they come here.
 */
export function completeSettings(
  given: Partial<Settings> = {},
): Settings & { readonly stepLength: Step | null } {
  const settings = { ...DEFAULT_SETTINGS, ...given };
  // Too many digits are no fault of the caller: each line then answers with `limit-digits`.
  if (!Number.isSafeInteger(settings.digits) || settings.digits < 1) {
    throw new RangeError(`digits is ${settings.digits}; a whole number above 0 was expected.`);
  }
  if (!LENGTH_UNITS.includes(settings.unit))
    throw new RangeError(
      `unit is ${String(settings.unit)}; one of ${LENGTH_UNITS.join(', ')} was expected.`,
    );
  if (!ROUNDINGS.includes(settings.rounding))
    throw new RangeError(
      `rounding is ${String(settings.rounding)}; one of ${ROUNDINGS.join(', ')} was expected.`,
    );
  if (settings.step === null) return { ...settings, stepLength: null };
  const reading = readStep(settings.step);
  if (reading.kind === 'problem') throw new RangeError(reading.message);
  return { ...settings, stepLength: reading.step };
}
