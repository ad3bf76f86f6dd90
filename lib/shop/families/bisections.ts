import { encloseArcsine, enclosePi } from '../circular';
import type { Candidate, Search, Wanted } from '../candidate';
import { type Form, fraction } from '../form';
import type { Interval } from '../interval';
import { BISECTOR, CIRCLE, LINE, REPEAT, type Strikes, sumStrikes, timesStrikes } from '../strikes';

interface Division {
  readonly parts: bigint;
  readonly strikes: Strikes;
}

const strikes = (s1: number, s2: number, c1: number, c3: number): Strikes => ({
  s1,
  s2,
  c1,
  c2: 0,
  c3,
});

const PENTAGON = strikes(2, 1, 8, 4);

/**
 * Divisions that the bisections start from. A diameter halves the circle; one circle of its radius about a point on it
 * gives sixths; five and seventeen parts as counted by DeTemple (American Mathematical Monthly 98, 1991); a fifteenth is
 * what two fifths have more than a third.
 */
const DIVISIONS: readonly Division[] = [
  { parts: 2n, strikes: LINE },
  { parts: 6n, strikes: CIRCLE },
  { parts: 5n, strikes: PENTAGON },
  { parts: 15n, strikes: sumStrikes(PENTAGON, CIRCLE) },
  { parts: 17n, strikes: strikes(8, 4, 22, 11) },
];

export type Measure = 'chord' | 'angle';

/**
 * k/2^m of a part of these divisions, as the chord of a circle with the base as radius or as an angle in turns: for each
 * number of parts the two whole k around the target.
 */
export function bisectionSearch(wanted: Wanted, measure: Measure): Search {
  const most = mostParts(wanted, measure);
  return {
    family: 'bisection',
    candidates: bisections(wanted, measure),
    ranges: `${measure === 'chord' ? 'chords' : 'angles'} by bisecting halves, thirds, fifths, fifteenths and seventeenths of the circle, up to ${most} parts`,
  };
}

const mostParts = ({ limits }: Wanted, measure: Measure): number =>
  measure === 'chord' ? limits.divisions : limits.angleDivisions;

function* bisections(wanted: Wanted, measure: Measure): Generator<Candidate> {
  const { arithmetic } = wanted;
  const most = BigInt(mostParts(wanted, measure));
  const turns = measure === 'angle' ? wanted.ratio : turnsOfChord(wanted);
  if (turns === null) return;
  for (const division of DIVISIONS) {
    for (let halvings = 0n; division.parts << halvings <= most; halvings += 1n) {
      const n = division.parts << halvings;
      const below = (turns.low * n) >> arithmetic.shift;
      for (const k of [below, below + 1n]) {
        const seen = halvings > 0n && k % 2n === 0n;
        if (k === 0n || seen || (measure === 'chord' && 2n * k > n)) continue;
        const part = fraction(k, n);
        const form: Form = measure === 'angle' ? part : { kind: 'chord', k: part.n, n: part.d };
        yield {
          family: 'bisection',
          form,
          strikes: () => strikesOf(division, Number(halvings), k),
          how: () => tell(division.parts, halvings, k, n, measure),
          source: null,
        };
      }
    }
  }
}

/** The part of a turn that a chord of this length takes; null when it is longer than the diameter. */
function turnsOfChord({ arithmetic, ratio }: Wanted): Interval | null {
  if (ratio.low > 2n * arithmetic.one) return null;
  const half = encloseArcsine(arithmetic, arithmetic.scale(ratio, 1n, 2n));
  return arithmetic.divide(half, enclosePi(arithmetic));
}

/** The division, whole parts stepped round with one opening up to the one that is bisected, and the bisections. */
function strikesOf(division: Division, halvings: number, k: bigint): Strikes {
  const parts = Number((k + (1n << BigInt(halvings)) - 1n) >> BigInt(halvings));
  const stepped =
    parts > 1 ? sumStrikes(CIRCLE, timesStrikes(REPEAT, parts - 2)) : timesStrikes(REPEAT, 0);
  return sumStrikes(division.strikes, stepped, timesStrikes(BISECTOR, halvings));
}

function tell(parts: bigint, halvings: bigint, k: bigint, n: bigint, measure: Measure): string {
  const what = measure === 'chord' ? 'The chord' : 'The angle';
  const times = halvings === 1n ? 'once' : halvings === 2n ? 'twice' : `${halvings} times`;
  const from = `the division into ${parts}`;
  return halvings === 0n
    ? `${what} of ${k} of ${n} parts of the circle, by ${from}.`
    : `${what} of ${k} of ${n} parts of the circle, by ${from}, bisected ${times}.`;
}
