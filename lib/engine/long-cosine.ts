/** Rational multiples of cosines whose square roots are too long to be built: their enclosures and their writing. */
import { normalAngle } from './algebraic/atoms';
import { encloseCosine } from './algebraic/cosine';
import { writeCosine } from './algebraic/write-named-sum';
import { floorDiv, type Enclosure } from './enclosure';
import type { Budget } from './limits';
import { Cosine } from './turn';
import type { Written } from './types';

export const isLongCosine = (x: unknown): x is Cosine => x instanceof Cosine && x.isTooLong;

/** The multiple between two integers over 2^P. */
export function cosineEnclosure({ k, n, scale }: Cosine, P: number, budget: Budget): Enclosure {
  const guard = scale.n.toString(2).length;
  const { low, high } = encloseCosine(k, n, P + guard, budget);
  const [least, most] = scale.n < 0n ? [high, low] : [low, high];
  const below = scale.d << BigInt(guard);
  return { low: floorDiv(least * scale.n, below), high: floorDiv(most * scale.n, below) + 1n };
}

export function nameOfCosine({ k, n, scale }: Cosine): Written {
  const angle = normalAngle(k, n);
  const { text, tex } = writeCosine(angle.k, angle.n);
  const top = scale.n * angle.sign;
  const sign = top < 0n ? '-' : '';
  const size = top < 0n ? -top : top;
  const front = size === 1n ? '' : `${size}`;
  const over = scale.d === 1n ? '' : `/${scale.d}`;
  return {
    text: `${sign}${front}${front === '' ? '' : '*'}${text}${over}`,
    tex: scale.d === 1n ? `${sign}${front}${tex}` : `${sign}\\frac{${front}${tex}}{${scale.d}}`,
    staged: false,
  };
}
