/**
 * The words that the cell language keeps for itself, with what they mean. One table serves the grammar,
 * the evaluator, completion in the editor and the reference page, so they cannot disagree.
 */

export interface FunctionWord {
  readonly name: string;
  /** As shown to a person, for instance `chord(R, angle)`. */
  readonly signature: string;
  /** One line: what it gives. */
  readonly meaning: string;
  /** Least and greatest number of arguments; `null` when any number will do. */
  readonly least: number;
  readonly most: number | null;
}

function word(
  signature: string,
  meaning: string,
  least = 1,
  most: number | null = least,
): FunctionWord {
  return { name: signature.slice(0, signature.indexOf('(')), signature, meaning, least, most };
}

export const FUNCTIONS: readonly FunctionWord[] = [
  word(
    'sqrt(x)',
    'The principal square root; halves a dimension, so the root of an area is a length.',
  ),
  word(
    'cbrt(x)',
    'The real cube root of a real x; of any other x the principal one, as in `x^(1/3)`.',
  ),
  word(
    'root(p, near)',
    'The root of the polynomial p in x, with any exact coefficients, that lies nearest to the second value.',
    2,
  ),
  word('abs(x)', 'The size of x: its distance from 0.'),
  word('re(x)', 'The real part.'),
  word('im(x)', 'The imaginary part, a real value.'),
  word('conj(x)', 'The complex conjugate.'),
  word('sin(angle)', 'The sine of an angle; a plain number is in radians.'),
  word('cos(angle)', 'The cosine of an angle; a plain number is in radians.'),
  word('tan(angle)', 'The tangent of an angle; a plain number is in radians.'),
  word('cot(angle)', 'The cotangent, 1/tan.'),
  word('sec(angle)', 'The secant, 1/cos.'),
  word('csc(angle)', 'The cosecant, 1/sin.'),
  word(
    'asin(x)',
    'The angle from -90° to 90° with this sine, where it is an exact part of a turn.',
  ),
  word(
    'acos(x)',
    'The angle from 0° to 180° with this cosine, where it is an exact part of a turn.',
  ),
  word(
    'atan(x)',
    'The angle from -90° to 90° with this tangent, where it is an exact part of a turn.',
  ),
  word('min(a, b, …)', 'The least of the values.', 1, null),
  word('max(a, b, …)', 'The greatest of the values.', 1, null),
  word(
    'floor(x, step)',
    'The greatest whole number, or multiple of the step, that is not above x.',
    1,
    2,
  ),
  word(
    'round(x, step)',
    'The nearest whole number, or multiple of the step; a tie goes to the even one.',
    1,
    2,
  ),
  word(
    'chord(R, angle)',
    'The straight line between two points of a circle of radius R, that angle apart.',
    2,
  ),
  word('sagitta(R, angle)', 'From the middle of that chord to the arc: R (1 - cos(angle/2)).', 2),
  word('versine(angle)', '1 - cos(angle).'),
  word(
    'standin(x, tolerance, R, n)',
    'The constructible value with the fewest strikes within the tolerance of x; R is the radius to start from (else the unit), n the parts it is stepped round.',
    2,
    4,
  ),
];

export interface UnitWord {
  readonly name: string;
  readonly meaning: string;
  readonly of: 'length' | 'angle';
  /** Size in millimetres, or in turns, as an exact fraction. */
  readonly size: { readonly n: bigint; readonly d: bigint };
}

export const UNITS: readonly UnitWord[] = [
  { name: 'mm', meaning: 'millimetre', of: 'length', size: { n: 1n, d: 1n } },
  { name: 'cm', meaning: 'centimetre', of: 'length', size: { n: 10n, d: 1n } },
  { name: 'm', meaning: 'metre', of: 'length', size: { n: 1000n, d: 1n } },
  { name: 'in', meaning: 'inch, 25.4 mm exactly', of: 'length', size: { n: 127n, d: 5n } },
  { name: 'ft', meaning: 'foot, 12 inches', of: 'length', size: { n: 1524n, d: 5n } },
  { name: 'deg', meaning: 'degree, 1/360 of a turn', of: 'angle', size: { n: 1n, d: 360n } },
  { name: 'turn', meaning: 'full turn', of: 'angle', size: { n: 1n, d: 1n } },
];

export interface ConstantWord {
  readonly name: string;
  readonly meaning: string;
}

export const CONSTANTS: readonly ConstantWord[] = [
  { name: 'i', meaning: 'the imaginary unit, i² = -1' },
  { name: 'pi', meaning: 'half the circumference of a circle of radius 1' },
];

const functionsByName = new Map(FUNCTIONS.map((entry) => [entry.name, entry]));
const unitsByName = new Map(UNITS.map((entry) => [entry.name, entry]));
const constantsByName = new Map(CONSTANTS.map((entry) => [entry.name, entry]));

export const findFunction = (name: string): FunctionWord | undefined => functionsByName.get(name);
export const findUnit = (name: string): UnitWord | undefined => unitsByName.get(name);
export const findConstant = (name: string): ConstantWord | undefined => constantsByName.get(name);

export type WordClass = 'function' | 'unit' | 'constant';

/** Which table keeps this word; `null` when it is free to be a mark. */
export function classOfWord(name: string): WordClass | null {
  if (functionsByName.has(name)) return 'function';
  if (unitsByName.has(name)) return 'unit';
  return constantsByName.has(name) ? 'constant' : null;
}
