import type { Engine, Num } from '../../engine/index';
import { type Interval, IntervalArithmetic } from '../../shop/interval';
import { encloseArcsine, enclosePi } from '../../shop/circular';

const DIGITS = 6;
const MOST_BITS = 1024;

/**
 * An angle from 0 to half a turn in degrees, correctly rounded to six figures, from its cosine; for a sentence about an
 * angle that has no exact measure. Null when the figures are not certain at 1024 bits, as at a tie.
 */
export function aboutDegrees(engine: Engine, cosine: Num): string | null {
  for (let bits = 64; bits <= MOST_BITS; bits *= 2) {
    const arithmetic = new IntervalArithmetic(bits);
    const { low, high } = degreesOf(engine, cosine, arithmetic);
    const [below, above] = [low, high].map(
      (end) => engine.decimal(engine.rational(end, arithmetic.one), DIGITS).re,
    );
    if (below !== undefined && below === above) return below;
  }
  return null;
}

/** arccos c = π/2 - arcsin c, and arccos(-c) = π - arccos c. */
function degreesOf(engine: Engine, cosine: Num, arithmetic: IntervalArithmetic): Interval {
  const size = engine.floor(engine.mul(engine.abs(cosine), engine.integer(arithmetic.one)));
  const arcsine = encloseArcsine(arithmetic, { low: size, high: size + 1n });
  const pi = enclosePi(arithmetic);
  const acute = arithmetic.subtract(arithmetic.scale(pi, 1n, 2n), arcsine);
  const radians = engine.sign(cosine) < 0 ? arithmetic.subtract(pi, acute) : acute;
  return arithmetic.divide(arithmetic.scale(radians, 180n), pi);
}
