import type { Engine, Multiple, Num, Rounding } from '../engine/index';
import { terminatingDecimal } from './decimals';
import { findUnit } from './names';
import { type PiSum, asAlgebraic, decideByEnclosures } from './pi-sum';
import type { Cut } from './result';
import type { Settings, Step } from './settings';

/**
 * The cut size of a real length in millimetres: the multiple of the step that the rounding rule picks, as a decimal in
 * the unit of the settings. Where the multiple has no ending decimal there (half a millimetre in inches) the decimal is
 * correctly rounded to the digits of the settings.
 */
export function cutSize(engine: Engine, length: PiSum, settings: Settings, step: Step): Cut {
  const { multiple, direction } = roundLength(engine, length, step, settings.rounding);
  const unit = findUnit(settings.unit);
  if (unit === undefined)
    throw new Error(`The unit "${settings.unit}" of the settings is not in the name table.`);
  const n = multiple * step.n * unit.size.d;
  const d = step.d * unit.size.n;
  const value =
    terminatingDecimal(n, d) ?? engine.decimal(engine.rational(n, d), settings.digits).re;
  return { value, step: settings.step ?? '', rounding: settings.rounding, direction };
}

/** The multiple of a step in millimetres that a rule of rounding picks for a real length. */
export function roundLength(
  engine: Engine,
  length: PiSum,
  step: Step,
  rounding: Rounding,
): Multiple {
  const round = (value: Num): Multiple => engine.roundToMultiple(value, step, rounding);
  const algebraic = asAlgebraic(engine, length);
  if (algebraic !== null) return round(algebraic);
  return decideByEnclosures(engine, length, 64, ({ low, high }) => {
    const [below, above] = [round(low), round(high)];
    return below.multiple === above.multiple && below.direction === above.direction ? below : null;
  });
}
