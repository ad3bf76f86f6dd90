import { encloseArcsine, enclosePi } from '../circular';
import type { Candidate, Search, Wanted } from '../candidate';
import { type Form, fraction } from '../form';
import {
  CIRCLE,
  LINE,
  PERPENDICULAR,
  REPEAT,
  type Strikes,
  TRANSFER,
  divide,
  hypotenuse,
  ratio,
  sumStrikes,
  timesStrikes,
} from '../strikes';

interface Rule {
  /** The division it is meant for; null for π. */
  readonly parts: number | null;
  readonly form: Form;
  readonly strikes: Strikes;
  readonly how: string;
  readonly source: string;
}

const root = (of: Form): Form => ({ kind: 'root', of });
const sum = (a: Form, b: Form): Form => ({ kind: 'sum', a, b });
const difference = (a: Form, b: Form): Form => ({ kind: 'difference', a, b });
const product = (a: Form, b: Form): Form => ({ kind: 'product', a, b });
const surd = (a: bigint, b: bigint, c: bigint, d: bigint): Form => ({ kind: 'surd', a, b, c, d });

/** Rules for single divisions, as the side over the radius, and for π. */
const RULES: readonly Rule[] = [
  {
    parts: 7,
    form: surd(0n, 1n, 3n, 2n),
    strikes: sumStrikes(CIRCLE, LINE, LINE),
    how: 'Half the side of the inscribed triangle serves as side of the heptagon.',
    source: 'Common practice',
  },
  {
    parts: 7,
    form: fraction(13n, 15n),
    strikes: ratio(13n, 15n),
    how: '13 of the 15 parts of the radius serve as side of the heptagon.',
    source: 'Common practice',
  },
  {
    parts: 7,
    form: { kind: 'hypotenuse', p: 6n, q: 5n, d: 9n },
    strikes: hypotenuse(6n, 5n, 9n),
    how: 'The hypotenuse over legs of 6 and 5 of the 9 parts of the radius, √61/9 of it.',
    source: 'Surdwork',
  },
  {
    parts: 9,
    // The half angle has the tangent t = (√35 - 3√3)/2; then 1 + t² = (33 - 3√105)/2 and the side is 2t/√(1 + t²).
    form: durerNine(),
    strikes: sumStrikes(CIRCLE, REPEAT, REPEAT, LINE, divide(3n), PERPENDICULAR, LINE, LINE),
    how: 'Three arcs of the radius from the rim through the centre; the perpendicular at a third of the axis meets two of them, and lines from the centre through these points give the side.',
    source: 'Dürer, Underweysung der Messung, 1525',
  },
  {
    parts: 11,
    form: fraction(9n, 16n),
    strikes: ratio(9n, 16n),
    how: '9 of the 16 parts of the radius serve as side of the hendecagon.',
    source: 'Dürer, Underweysung der Messung, 1525 (after Cook 2023)',
  },
  {
    parts: null,
    form: root(difference(fraction(40n, 3n), surd(0n, 2n, 3n, 1n))),
    strikes: sumStrikes(LINE, PERPENDICULAR, CIRCLE, REPEAT, LINE, timesStrikes(REPEAT, 3), LINE),
    how: 'On the tangent at one end of a diameter three radii from where a line at 30° meets it; from there to the other end.',
    source: 'Kochański, Acta Eruditorum, 1685',
  },
  {
    parts: null,
    form: fraction(22n, 7n),
    strikes: ratio(22n, 7n),
    how: '22/7 of the radius.',
    source: 'Archimedes, Measurement of a Circle',
  },
  {
    parts: null,
    form: fraction(355n, 113n),
    strikes: ratio(355n, 113n),
    how: '355/113 of the radius.',
    source: 'Zu Chongzhi, fifth century',
  },
];

function durerNine(): Form {
  const tangent = difference(
    product(fraction(1n, 2n), root(fraction(35n))),
    product(fraction(3n, 2n), root(fraction(3n))),
  );
  // 2t/√(1+t²) = 2t·√(1/(1+t²)), and 1/(1+t²) = 2/(33-3√105) = 2(33+3√105)/144 = (11+√105)/24.
  return product(fraction(2n), product(tangent, root(surd(11n, 1n, 105n, 24n))));
}

const BION = 'Bion, Traité de la construction … des instrumens de mathématique, 1709';
const TEMPIER = 'Tempier, as described by Freitas and Tavares, College Math. J. 49, 2018';

/**
 * Bion's rule: a line from the apex of the equilateral triangle on the diameter through the second of its n parts. With
 * u = 1 - 4/n it meets the circle where the arc from the end of the diameter has the cosine u·t, u²t² + 3(1-t)² = 1.
 */
function bion(n: bigint): Rule {
  const u = fraction(n - 4n, n);
  return {
    parts: Number(n),
    form: root(difference(fraction(2n), scaled(2n * u.n, u.d, reach(u)))),
    strikes: sumStrikes(LINE, CIRCLE, REPEAT, ratioOfDiameter(n), LINE),
    how: `The line from the apex of the equilateral triangle on the diameter through the second of its ${n} parts cuts off the side.`,
    source: BION,
  };
}

/**
 * Tempier's rule: the line from that apex goes through the point two n-th parts of the diameter from the centre, and the
 * arc is taken from the far end of the axis; with v = 4/n its cosine is √3(t - 1). For n ≥ 4.
 */
function tempier(n: bigint): Rule {
  const far = difference(reach(fraction(4n, n)), fraction(1n));
  const cosine = product(root(fraction(3n)), far);
  return {
    parts: Number(n),
    form: root(difference(fraction(2n), product(fraction(2n), cosine))),
    strikes: sumStrikes(LINE, CIRCLE, REPEAT, ratioOfDiameter(n), TRANSFER, LINE, LINE),
    how: `The line from the apex of the equilateral triangle on the diameter through the point two of its ${n} parts from the centre cuts off the side, measured from the end of the axis.`,
    source: TEMPIER,
  };
}

/** t = (3 + √(3 - 2u²))/(u² + 3): how far the line from the apex goes, the way to the diameter being 1. */
function reach(u: { n: bigint; d: bigint }): Form {
  const square = u.n * u.n;
  const whole = u.d * u.d;
  const rest = root(fraction(3n * whole - 2n * square, whole));
  return scaled(whole, square + 3n * whole, sum(fraction(3n), rest));
}

const scaled = (n: bigint, d: bigint, of: Form): Form => product(fraction(n, d), of);

/** Two of the n parts of the diameter. */
const ratioOfDiameter = (n: bigint): Strikes => (n % 2n === 0n ? ratio(1n, n / 2n) : ratio(2n, n));

/** Bion and Tempier are meant for any number of parts; beyond this one nobody would set out so. */
const MOST_PARTS = 360n;

/** Rules of the trade for the division in hand, or the one that the target is nearest to, and for π and simple parts of it. */
export function classicalSearch(wanted: Wanted): Search {
  const n = wanted.parts ?? nearestDivision(wanted);
  const general = n !== null && n >= 5 && BigInt(n) <= MOST_PARTS ? [BigInt(n)] : [];
  const rules = [
    ...RULES.filter(({ parts }) => parts !== null && parts === n),
    ...general.flatMap((parts) => [bion(parts), tempier(parts)]),
    ...RULES.filter(({ parts }) => parts === null).flatMap(multiples),
  ];
  const division = n === null ? '' : ` for the division into ${n} (Bion and Tempier included)`;
  return {
    family: 'classical',
    candidates: rules.map(({ form, strikes, how, source }): Candidate => ({
      family: 'classical',
      form,
      strikes: () => strikes,
      how: () => how,
      source,
    })),
    ranges: `rules of the trade${division} and for π, its double and its half`,
  };
}

/** π is wanted as it is, doubled for a circumference, halved for a quarter of it. */
function multiples(rule: Rule): Rule[] {
  const half = fraction(1n, 2n);
  const times = (factor: Form): Form =>
    rule.form.kind === 'fraction' && factor.kind === 'fraction'
      ? fraction(rule.form.n * factor.n, rule.form.d * factor.d)
      : product(factor, rule.form);
  return [
    rule,
    {
      ...rule,
      form: times(fraction(2n)),
      strikes: sumStrikes(rule.strikes, CIRCLE),
      how: `${rule.how} Doubled.`,
    },
    {
      ...rule,
      form: times(half),
      strikes: sumStrikes(rule.strikes, divide(2n)),
      how: `${rule.how} Halved.`,
    },
  ];
}

/** The n whose regular n-gon in a circle with the base as radius has a side next to the target. */
function nearestDivision({ arithmetic, ratio: target }: Wanted): number | null {
  if (target.high > 2n * arithmetic.one) return null;
  const half = encloseArcsine(arithmetic, arithmetic.scale(target, 1n, 2n)).low;
  if (half <= 0n) return null;
  const n = (2n * enclosePi(arithmetic).low + half) / (2n * half);
  return n >= 3n && n <= MOST_PARTS ? Number(n) : null;
}
