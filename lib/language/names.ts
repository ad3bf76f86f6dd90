/**
 * The words and forms of the cell language, with what they mean. One table serves the grammar, the evaluator,
 * completion in the editor and the reference page, so they cannot disagree. Each example is a cell of one or more
 * lines that evaluates without an error; a test runs them all.
 */

/** Groups in the order in which a reference shows them. */
export const GROUPS = [
  { name: 'roots', title: 'Roots and size' },
  { name: 'equations', title: 'Equations' },
  { name: 'angles', title: 'Angles' },
  { name: 'rounding', title: 'Rounding and order' },
  { name: 'lists', title: 'Lists' },
  { name: 'trade', title: 'Arcs and stand-ins' },
  { name: 'geometry', title: 'Points, lines and circles' },
  { name: 'complex', title: 'Complex values' },
] as const;

export type FunctionGroup = (typeof GROUPS)[number]['name'];

export interface FunctionWord {
  readonly name: string;
  /** As shown to a person, for instance `chord(R, angle)`. */
  readonly signature: string;
  /** One line: what it gives. */
  readonly meaning: string;
  readonly group: FunctionGroup;
  readonly example: string;
  /** What to give for each argument, where the signature does not say it all. */
  readonly parameters: Readonly<Record<string, string>>;
  /** Least and greatest number of arguments; `null` when any number will do. */
  readonly least: number;
  readonly most: number | null;
  /** Whether a list in place of an argument makes a list of results, item by item. */
  readonly itemByItem: boolean;
  /** Whether the first argument may be an equation. */
  readonly equation: boolean;
}

type Details = Partial<
  Pick<FunctionWord, 'parameters' | 'least' | 'most' | 'itemByItem' | 'equation'>
>;

/** An entry of one argument, taken item by item from a list, unless the details say otherwise. */
function word(
  group: FunctionGroup,
  signature: string,
  meaning: string,
  example: string,
  details: Details = {},
): FunctionWord {
  const least = details.least ?? 1;
  return {
    name: signature.slice(0, signature.indexOf('(')),
    signature,
    meaning,
    group,
    example,
    parameters: {},
    most: least,
    itemByItem: true,
    equation: false,
    ...details,
    least,
  };
}

const WHOLE = { itemByItem: false } as const;
const ANGLE = { angle: 'An angle with its unit; a plain number is in radians.' } as const;
const STEP = {
  step: 'Left out, it is 1; a value with a unit needs a step with that unit.',
} as const;
const PAIR = { least: 2 } as const;
const TWO_OR_THREE = { least: 2, most: 3 } as const;
const ARC = {
  parameters: { R: 'The radius, a length.', angle: 'The angle at the centre, up to one turn.' },
  least: 2,
} as const;

export const FUNCTIONS: readonly FunctionWord[] = [
  word(
    'roots',
    'sqrt(x)',
    'The principal square root; halves a dimension, so the root of an area is a length.',
    'sqrt(5 + 2 sqrt(6))',
  ),
  word(
    'roots',
    'cbrt(x)',
    'The real cube root of a real x, a length for a volume; of any other x the principal one, as in `x^(1/3)`.',
    'cbrt(2 + sqrt(5)) + cbrt(2 - sqrt(5))',
  ),
  word(
    'roots',
    'root(p, near)',
    'The root of the polynomial p in x, with any exact coefficients, that lies nearest to the second value.',
    'root(x^3 - 2x - 5, 2)',
    {
      ...WHOLE,
      least: 2,
      parameters: {
        p: 'A polynomial; `x` in it is its variable, whatever marks there are.',
        near: 'A plain number nearer to the root that is meant than to any other.',
      },
    },
  ),
  word(
    'equations',
    'solve(equation, unknown, near)',
    'The value of the unknown, or the list of its values when there are several: the real ones, rising. Each is checked exactly.',
    'solve(10025 mm == (2000 mm)^2/(8 h) + h/2, h)',
    {
      ...WHOLE,
      least: 2,
      most: 3,
      equation: true,
      parameters: {
        equation: 'Two sides with `==` between them.',
        unknown: 'A name; in the equation it is the unknown, whatever marks there are.',
        near: 'Left out, all values are given; else the one nearest to this.',
      },
    },
  ),
  word('roots', 'abs(x)', 'The size of x: its distance from 0.', 'abs(3 - sqrt(10))'),
  word('angles', 'sin(angle)', 'The sine of an angle.', 'sin(turn/34)', { parameters: ANGLE }),
  word('angles', 'cos(angle)', 'The cosine of an angle.', 'cos(2 pi/7)', { parameters: ANGLE }),
  word('angles', 'tan(angle)', 'The tangent of an angle.', 'tan(22.5°)', { parameters: ANGLE }),
  word('angles', 'cot(angle)', 'The cotangent, 1/tan.', 'cot(15°)', { parameters: ANGLE }),
  word('angles', 'sec(angle)', 'The secant, 1/cos.', 'sec(36°)', { parameters: ANGLE }),
  word('angles', 'csc(angle)', 'The cosecant, 1/sin.', 'csc(18°)', { parameters: ANGLE }),
  word(
    'angles',
    'asin(x)',
    'The angle from -90° to 90° with this sine, where it is an exact part of a turn.',
    'asin(1/2)',
  ),
  word(
    'angles',
    'acos(x)',
    'The angle from 0° to 180° with this cosine, where it is an exact part of a turn.',
    'acos((sqrt(5) - 1)/4)',
  ),
  word(
    'angles',
    'atan(x)',
    'The angle from -90° to 90° with this tangent, where it is an exact part of a turn.',
    'atan(2 - sqrt(3))',
  ),
  word(
    'rounding',
    'min(a, b, …)',
    'The least of the values, or of the items of a list.',
    'min(7/5, sqrt(2), 17/12)',
    { ...WHOLE, most: null },
  ),
  word(
    'rounding',
    'max(a, b, …)',
    'The greatest of the values, or of the items of a list.',
    'max(7/5, sqrt(2), 17/12)',
    { ...WHOLE, most: null },
  ),
  word(
    'rounding',
    'floor(x, step)',
    'The greatest whole number, or multiple of the step, that is not above x.',
    'floor(100 mm sqrt(2), 0.5 mm)',
    { most: 2, parameters: STEP },
  ),
  word(
    'rounding',
    'round(x, step)',
    'The nearest whole number, or multiple of the step; a tie goes to the even one.',
    'round(100 mm sqrt(2), 0.5 mm)',
    { most: 2, parameters: STEP },
  ),
  word(
    'lists',
    'each(k, first, last, value)',
    'The list of the values as k counts up from first to last.',
    'each(k, 1, 8, 2 * 1200 mm sin(k turn/34))',
    {
      ...WHOLE,
      least: 4,
      parameters: {
        k: 'A name for the counter; it means the count in the value and nothing outside.',
        first: 'A whole number.',
        last: 'A whole number that is not below the first.',
        value: 'Any expression with the counter in it.',
      },
    },
  ),
  word('lists', 'sum(L)', 'The sum of the items of a list.', 'sum([1/2, 1/3, 1/6])', WHOLE),
  word('lists', 'count(L)', 'How many items a list has.', 'count([3 mm, 4 mm, 5 mm])', WHOLE),
  word(
    'trade',
    'chord(R, angle)',
    'The straight line between two points of a circle of radius R, that angle apart.',
    'chord(1200 mm, turn/17)',
    ARC,
  ),
  word(
    'trade',
    'sagitta(R, angle)',
    'From the middle of that chord to the arc: R (1 - cos(angle/2)).',
    'sagitta(1200 mm, turn/17)',
    ARC,
  ),
  word('trade', 'versine(angle)', '1 - cos(angle).', 'versine(60°)', { parameters: ANGLE }),
  word(
    'trade',
    'standin(x, tolerance, R, n)',
    'The constructible value with the fewest strikes within the tolerance of x.',
    'standin(chord(1200 mm, turn/7), 0.2 mm, 1200 mm, 7)',
    {
      ...WHOLE,
      least: 2,
      most: 4,
      parameters: {
        x: 'A length or an angle above 0.',
        tolerance: 'How far off it may be.',
        R: 'The radius to start from; left out, the unit.',
        n: 'The number of parts it is stepped round; a stand-in whose ring keeps to the tolerance is taken first.',
      },
    },
  ),
  word(
    'geometry',
    'point(x, y)',
    'The point with these coordinates, x to the right and y upwards: lengths, or plain numbers.',
    'point(300 mm, 0)',
    { ...PAIR, parameters: { x: 'A coordinate 0 needs no unit.' } },
  ),
  word(
    'geometry',
    'polar(R, angle)',
    'The point at the distance R from the origin, the angle measured anticlockwise from the x-axis.',
    'polar(1200 mm, turn/17)',
    PAIR,
  ),
  word(
    'geometry',
    'line(P, Q)',
    'The line through two points; `line(a, b, c)` is the line a x + b y + c = 0.',
    'line(point(0, 0), point(3, 4))',
    TWO_OR_THREE,
  ),
  word(
    'geometry',
    'circle(C, R)',
    'The circle about C with the radius R; `circle(C, P)` passes through P, `circle(P, Q, S)` through three points.',
    'circle(point(0, 0), 1200 mm)',
    TWO_OR_THREE,
  ),
  word(
    'geometry',
    'ring(C, R, n, angle)',
    'The list of n points that divide the circle about C with the radius R equally, anticlockwise from the top.',
    'ring(point(0, 0), 450 mm, 5)',
    {
      least: 3,
      most: 4,
      parameters: { angle: 'Where the first point lies instead, measured from the x-axis.' },
    },
  ),
  word(
    'geometry',
    'meet(g, h, which)',
    'Where two lines or circles meet.',
    'meet(circle(point(0, 0), 5), line(0, 1, -3), 2)',
    {
      ...TWO_OR_THREE,
      parameters: {
        which:
          'Of two points, 1 is the left one (the lower, if one stands above the other), 2 the other; a point picks the nearer one.',
      },
    },
  ),
  word('geometry', 'mid(P, Q)', 'The middle of two points.', 'mid(point(0, 0), point(3, 4))', PAIR),
  word(
    'geometry',
    'foot(P, g)',
    'The foot of the perpendicular from P on the line g.',
    'foot(point(1, 2), line(1, 1, 0))',
    PAIR,
  ),
  word(
    'geometry',
    'perp(g, P)',
    'The line at right angles to g through P.',
    'perp(line(1, 1, 0), point(1, 2))',
    PAIR,
  ),
  word(
    'geometry',
    'parallel(g, P)',
    'The line parallel to g through P.',
    'parallel(line(1, 1, 0), point(1, 2))',
    PAIR,
  ),
  word(
    'geometry',
    'bisect(P, V, Q)',
    'The line that halves the angle at V; `bisect(P, Q)` is the line of all points as far from P as from Q.',
    'bisect(point(1, 0), point(0, 0), point(1, 2))',
    TWO_OR_THREE,
  ),
  word(
    'geometry',
    'rotate(P, angle, C)',
    'A point, line or circle turned anticlockwise about C, or about the origin.',
    'rotate(point(5, 0), turn/5)',
    TWO_OR_THREE,
  ),
  word(
    'geometry',
    'reflect(P, g)',
    'A point, line or circle mirrored in a line or in a point.',
    'reflect(point(1, 2), line(1, -1, 0))',
    PAIR,
  ),
  word(
    'geometry',
    'dist(P, Q)',
    'The distance of two points, of a point and a line, or of two parallel lines.',
    'dist(point(0, 0), point(3 mm, 4 mm))',
    PAIR,
  ),
  word(
    'geometry',
    'angle(P, V, Q)',
    'The angle at V from 0 to half a turn; `angle(g, h)` is the one between two lines, up to a quarter turn.',
    'angle(point(1, 0), point(0, 0), point(1, 1))',
    TWO_OR_THREE,
  ),
  word('geometry', 'abscissa(P)', 'The x of a point.', 'abscissa(polar(5, 36°))'),
  word('geometry', 'ordinate(P)', 'The y of a point.', 'ordinate(polar(5, 36°))'),
  word('geometry', 'centre(c)', 'The centre of a circle.', 'centre(circle(point(1, 2), 3))'),
  word('geometry', 'radius(c)', 'The radius of a circle.', 'radius(circle(point(1, 2), 3))'),
  word('complex', 're(x)', 'The real part.', 're((1 + 2i)^3)'),
  word('complex', 'im(x)', 'The imaginary part, a real value.', 'im((1 + 2i)^3)'),
  word('complex', 'conj(x)', 'The complex conjugate.', 'conj(3 + 4i)'),
];

export interface UnitWord {
  readonly name: string;
  readonly meaning: string;
  readonly of: 'length' | 'angle';
  /** Size in millimetres, or in turns, as an exact fraction. */
  readonly size: { readonly n: bigint; readonly d: bigint };
  readonly example: string;
}

export const UNITS: readonly UnitWord[] = [
  {
    name: 'mm',
    meaning: 'millimetre',
    of: 'length',
    size: { n: 1n, d: 1n },
    example: '1200 mm',
  },
  {
    name: 'cm',
    meaning: 'centimetre',
    of: 'length',
    size: { n: 10n, d: 1n },
    example: '12 cm * 5 cm',
  },
  { name: 'm', meaning: 'metre', of: 'length', size: { n: 1000n, d: 1n }, example: '2.4 m' },
  {
    name: 'in',
    meaning: 'inch, 25.4 mm exactly',
    of: 'length',
    size: { n: 127n, d: 5n },
    example: '3 1/2 in',
  },
  {
    name: 'ft',
    meaning: 'foot, 12 inches',
    of: 'length',
    size: { n: 1524n, d: 5n },
    example: '5 ft 3 1/2 in',
  },
  {
    name: 'deg',
    meaning: 'degree, 1/360 of a turn',
    of: 'angle',
    size: { n: 1n, d: 360n },
    example: '30 deg == 30°',
  },
  {
    name: 'turn',
    meaning: 'full turn',
    of: 'angle',
    size: { n: 1n, d: 1n },
    example: 'turn/17',
  },
];

/** Parts of a degree, which stand only after degrees; elsewhere `min` and `sec` are functions. */
export const DEGREE_PARTS: readonly (UnitWord & { readonly sign: string })[] = [
  {
    name: 'min',
    sign: '′',
    meaning: 'minute of arc, 1/60 of a degree',
    of: 'angle',
    size: { n: 1n, d: 21_600n },
    example: '51 deg 30 min',
  },
  {
    name: 'sec',
    sign: '″',
    meaning: 'second of arc, 1/60 of a minute',
    of: 'angle',
    size: { n: 1n, d: 1_296_000n },
    example: '51° 30′ 15.5″',
  },
];

export interface ConstantWord {
  readonly name: string;
  readonly meaning: string;
  readonly example: string;
}

export const CONSTANTS: readonly ConstantWord[] = [
  { name: 'i', meaning: 'the imaginary unit, i² = -1', example: '(1 + i)^2' },
  {
    name: 'pi',
    meaning: 'half the circumference of a circle of radius 1',
    example: '2 pi * 1200 mm',
  },
];

/** A way of writing that is no function: how it looks, what it means, and an example. */
export interface FormWord {
  readonly name: string;
  readonly form: string;
  readonly meaning: string;
  readonly example: string;
}

export const FORMS: readonly FormWord[] = [
  {
    name: 'mark',
    form: 'name = value',
    meaning: 'Gives a value a mark that other lines read, wherever they stand on the page.',
    example: 'R = 1200 mm\n2 pi R',
  },
  {
    name: 'decision',
    form: 'a == b, a != b, a < b, a <= b',
    meaning: 'Decides exactly how values stand to each other; several may follow one another.',
    example: 'sqrt(2) + sqrt(3) == sqrt(5 + 2 sqrt(6))',
  },
  {
    name: 'implied product',
    form: '2R, 3 sqrt(2), R(1 + k)',
    meaning:
      'A value before a name or a bracket multiplies it, at one level with `*` and `/`: `1/2 R` is `(1/2) R`.',
    example: 'R = 3\n1/2 R == (1/2) * R',
  },
  {
    name: 'power',
    form: 'x^n, x², x³',
    meaning: 'A power; `2^3^2` is `2^(3^2)` and `-2^2` is `-(2^2)`.',
    example: '2^(1/2) == sqrt(2)',
  },
  {
    name: 'root sign',
    form: '√x',
    meaning: 'The square root of the next number, name or bracket: `√2 R` is `(√2) R`.',
    example: '√(2 + √3)',
  },
  {
    name: 'fraction of a unit',
    form: '3/4 in',
    meaning: 'A whole number over a whole number with a unit is one quantity.',
    example: '3/4 in',
  },
  {
    name: 'mixed number',
    form: '3 1/2 in',
    meaning: 'A whole number and a proper fraction, only before inches or feet.',
    example: '-3 1/2 in == -(3 + 1/2) in',
  },
  {
    name: 'feet and inches',
    form: '5 ft 3 1/2 in',
    meaning: 'One length in feet and inches.',
    example: '5 ft 3 1/2 in == 63.5 in',
  },
  {
    name: 'degrees, minutes, seconds',
    form: '51° 30′ 15.5″, 51 deg 30 min 15.5 sec',
    meaning: 'One angle; minutes and seconds stand only after degrees.',
    example: '51° 30\' 15.5" == 51 deg 30 min 15.5 sec',
  },
  {
    name: 'list',
    form: '[a, b, c]',
    meaning:
      'Several values in order. Arithmetic and functions of one value work item by item; two lists need one count.',
    example: '[3 mm, 4 mm, 5 mm] * 2',
  },
  {
    name: 'item of a list',
    form: 'L[k]',
    meaning: 'The k-th item, counted from 1 as on a drawing.',
    example: 'L = [3 mm, 4 mm, 5 mm]\nL[2]',
  },
  {
    name: 'function',
    form: 'f(x, y) = value',
    meaning:
      'Defines a function for the whole notebook. Parameters are local; the value may read marks. No function may come back to itself.',
    example: 'rise(span, R) = R - sqrt(R^2 - (span/2)^2)\nrise(1200 mm, 1000 mm)',
  },
  {
    name: 'where',
    form: 'value where a = …, b = …',
    meaning: 'Gives names for this line only, each of which may read those before it.',
    example: 'v = 2 r sin(a/2) where r = 2050 mm, a = turn/17',
  },
  {
    name: 'remark',
    form: '# …',
    meaning: 'What stands after the sign is not read.',
    example: 'R = 1200 mm # to the springing',
  },
];

/** Words that are neither functions nor units nor constants, and yet cannot be marks. */
const OTHER_WORDS: ReadonlySet<string> = new Set(['where']);

const functionsByName = new Map(FUNCTIONS.map((entry) => [entry.name, entry]));
const unitsByName = new Map(UNITS.map((entry) => [entry.name, entry]));
const degreePartsByName = new Map(DEGREE_PARTS.map((entry) => [entry.name, entry]));
const constantsByName = new Map(CONSTANTS.map((entry) => [entry.name, entry]));

export const findFunction = (name: string): FunctionWord | undefined => functionsByName.get(name);
export const findUnit = (name: string): UnitWord | undefined => unitsByName.get(name);
export const findDegreePart = (name: string): UnitWord | undefined => degreePartsByName.get(name);
export const findConstant = (name: string): ConstantWord | undefined => constantsByName.get(name);

export type WordClass = 'function' | 'unit' | 'constant' | 'word';

/** Which table keeps this word; `null` when it is free to be a mark. */
export function classOfWord(name: string): WordClass | null {
  if (functionsByName.has(name)) return 'function';
  if (unitsByName.has(name)) return 'unit';
  if (constantsByName.has(name)) return 'constant';
  return OTHER_WORDS.has(name) ? 'word' : null;
}
