import type {
  Bare,
  CircleResult,
  Cut,
  LineResult,
  NumberPart,
  PointResult,
} from '@/lib/language/index';
import { breakableDigits, escapeTex } from './tex-text';

type Figure = Bare<PointResult> | Bare<LineResult> | Bare<CircleResult>;

/** The numbers that fix a figure, by name. */
export function figureParts(result: Figure): [name: string, part: NumberPart][] {
  switch (result.kind) {
    case 'point':
      return Object.entries(result.coordinates);
    case 'line':
      return Object.entries(result.coefficients);
    case 'circle':
      return [
        ['Centre, x', result.centre.x],
        ['Centre, y', result.centre.y],
        ['Radius', result.radius],
      ];
  }
}

/** `mm^2` as TeX. */
export function unitTex(unit: string): string {
  const [name = '', exponent] = unit.split('^');
  return exponent === undefined ? `\\,\\mathrm{${name}}` : `\\,\\mathrm{${name}}^{${exponent}}`;
}

/** A decimal string, with a power of ten where it has one. */
export function decimalTex(value: string): string {
  const [mantissa = '', exponent] = value.split('e');
  const power = exponent === undefined ? '' : `\\cdot 10^{${exponent.replace('+', '')}}`;
  return breakableDigits(mantissa) + power;
}

const DIRECTIONS: Readonly<Record<Cut['direction'], string>> = {
  up: 'rounded up, so greater than the exact value',
  down: 'rounded down, so less than the exact value',
  exact: 'the exact value itself',
};

export function cutTex(cut: Cut, unit: string): string {
  return `$${breakableDigits(cut.value)}${unitTex(unit)}$, ${DIRECTIONS[cut.direction]} (step ${escapeTex(cut.step)}, ${cut.rounding})`;
}
