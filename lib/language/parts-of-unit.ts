import type { Engine, Multiple, Num } from '../engine/index';
import { roundLength } from './cut';
import { gcd } from './decimals';
import { type PiSum, addSums, fromNum, negateSum } from './pi-sum';
import type { DegreesMinutesSeconds, Inches } from './result';
import type { LengthUnit } from './settings';

const PARTS_OF_INCH = 64n;
const STEP = { n: 127n, d: 5n * PARTS_OF_INCH } as const;

/**
 * A real length in millimetres as inches and sixty-fourths, with feet when the unit is feet, rounded to the nearest, ties
 * to even; and the error that this makes.
 */
export function inInches(engine: Engine, length: PiSum, unit: LengthUnit): Inches {
  const { multiple, direction } = roundLength(engine, length, STEP, 'half-even');
  const rounded = fromNum(engine, engine.rational(multiple * STEP.n, STEP.d));
  return {
    text: writeInches(multiple, unit === 'ft'),
    denominator: Number(PARTS_OF_INCH),
    error: writeError(engine, addSums(engine, rounded, negateSum(engine, length)), direction),
    direction,
  };
}

function writeInches(multiple: bigint, withFeet: boolean): string {
  const size = multiple < 0n ? -multiple : multiple;
  const perFoot = 12n * PARTS_OF_INCH;
  const feet = withFeet ? size / perFoot : 0n;
  const rest = withFeet ? size % perFoot : size;
  const [whole, over] = [rest / PARTS_OF_INCH, rest % PARTS_OF_INCH];
  const common = gcd(over, PARTS_OF_INCH);
  const fraction = over === 0n ? '' : `${over / common}/${PARTS_OF_INCH / common}`;
  const count =
    whole === 0n && fraction !== '' ? fraction : `${whole}${fraction === '' ? '' : ` ${fraction}`}`;
  const inches = feet > 0n && rest === 0n ? '' : `${count} in`;
  const text = [feet > 0n ? `${feet} ft` : '', inches].filter((part) => part !== '').join(' ');
  return multiple < 0n ? `-${text}` : text;
}

const DECIMALS = 6;

/** Six decimals of millimetres with their sign, correctly rounded. */
function writeError(engine: Engine, error: PiSum, direction: Multiple['direction']): string {
  if (direction === 'exact') return '0';
  const scale = 10n ** BigInt(DECIMALS);
  const scaled = roundLength(engine, error, { n: 1n, d: scale }, 'half-even').multiple;
  const [size, sign] = scaled < 0n ? [-scaled, '-'] : [scaled, direction === 'up' ? '+' : '-'];
  const digits = size.toString().padStart(DECIMALS + 1, '0');
  return `${sign}${digits.slice(0, -DECIMALS)}.${digits.slice(-DECIMALS)}`;
}

/** Tenths of a second in a turn. */
const TENTHS = 12_960_000n;

/** A real angle in turns as degrees, minutes and tenths of a second, rounded to the nearest, ties to even. */
export function inDegrees(engine: Engine, turns: Num): DegreesMinutesSeconds {
  const step = { n: 1n, d: TENTHS };
  const { multiple, direction } = engine.roundToMultiple(turns, step, 'half-even');
  const size = multiple < 0n ? -multiple : multiple;
  const seconds = `${(size / 10n) % 60n}${size % 10n === 0n ? '' : `.${size % 10n}`}`;
  const text = `${size / 36_000n}° ${(size / 600n) % 60n}′ ${seconds}″`;
  return { text: multiple < 0n ? `-${text}` : text, direction };
}
