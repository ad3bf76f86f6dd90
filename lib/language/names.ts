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
  word(
    'point(x, y)',
    'The point with these coordinates, x to the right and y upwards: lengths, or plain numbers. A coordinate 0 needs no unit.',
    2,
  ),
  word(
    'polar(R, angle)',
    'The point at the distance R from the origin, the angle measured anticlockwise from the x-axis.',
    2,
  ),
  word(
    'line(P, Q)',
    'The line through two points; `line(a, b, c)` is the line a x + b y + c = 0.',
    2,
    3,
  ),
  word(
    'circle(C, R)',
    'The circle about C with the radius R; `circle(C, P)` passes through P, `circle(P, Q, S)` through three points.',
    2,
    3,
  ),
  word(
    'meet(g, h, which)',
    'Where two lines or circles meet. Of two points, 1 is the left one (the lower, if one stands above the other), 2 the other; a point picks the nearer one.',
    2,
    3,
  ),
  word('mid(P, Q)', 'The middle of two points.', 2),
  word('foot(P, g)', 'The foot of the perpendicular from P on the line g.', 2),
  word('perp(g, P)', 'The line at right angles to g through P.', 2),
  word('parallel(g, P)', 'The line parallel to g through P.', 2),
  word(
    'bisect(P, V, Q)',
    'The line that halves the angle at V; `bisect(P, Q)` is the line of all points as far from P as from Q.',
    2,
    3,
  ),
  word(
    'rotate(P, angle, C)',
    'A point, line or circle turned anticlockwise about C, or about the origin.',
    2,
    3,
  ),
  word('reflect(P, g)', 'A point, line or circle mirrored in a line or in a point.', 2),
  word(
    'dist(P, Q)',
    'The distance of two points, of a point and a line, or of two parallel lines.',
    2,
  ),
  word(
    'angle(P, V, Q)',
    'The angle at V from 0 to half a turn; `angle(g, h)` is the one between two lines, up to a quarter turn.',
    2,
    3,
  ),
  word('abscissa(P)', 'The x of a point.'),
  word('ordinate(P)', 'The y of a point.'),
  word('centre(c)', 'The centre of a circle.'),
  word('radius(c)', 'The radius of a circle.'),
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
