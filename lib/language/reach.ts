import type { Engine, Num, Reach as EngineReach } from '../engine/index';
import { decideDivision } from '../divisions/reach';
import type { Reach } from './result';

/** Reach of a value that the engine holds: it is made of square roots, so straightedge and compass reach it. */
export function reachOfConstructible(rational: boolean, roots: number | null): Reach {
  const reason = rational
    ? 'It is rational, so straightedge and compass reach it.'
    : `It is built from rational numbers by ${countRoots(roots)}, so straightedge and compass reach it.`;
  return { straightedgeAndCompass: true, withTrisector: true, reason };
}

type Beyond = Exclude<EngineReach, { kind: 'constructible' }>;

/** Reach of a value that the engine holds, with the reason why not. */
export function reachOfValue(engine: Engine, value: Num, roots: number | null): Reach {
  const verdict = engine.reach(value);
  if (verdict.kind === 'constructible') {
    return reachOfConstructible(engine.isRational(value), roots);
  }
  return {
    straightedgeAndCompass: verdict.kind === 'undecided' ? null : false,
    withTrisector: verdict.trisector.reaches,
    reason: `${whyNot(verdict)}; ${trisectorClause(verdict)}.`,
  };
}

function whyNot(verdict: Beyond): string {
  const { degree } = verdict;
  switch (verdict.kind) {
    case 'degree':
      return `Its degree is ${degree}, which is no power of two, so straightedge and compass cannot reach it`;
    case 'splitting': {
      const { prime, degrees } = verdict.splitting;
      return `Modulo ${prime} its polynomial splits into factors of degrees ${degrees.join(', ')}, so the order of its Galois group is no power of two and straightedge and compass cannot reach it`;
    }
    case 'stuck':
      return `A field of degree ${degree} that it belongs to has no quadratic step down, so straightedge and compass cannot reach it`;
    case 'undecided':
      return `Its degree ${degree} is a power of two, and whether square roots reach it went over the limit of the search`;
  }
}

const WHY_OPEN = {
  coefficients: 'a cubic that it needs has coefficients that are not real',
  step: 'its field has a step of a high degree without a field between',
  limit: 'the search of its subfields went over a limit',
} as const;

function trisectorClause({ trisector, division, degree }: Beyond): string {
  switch (trisector.by) {
    case 'division':
      return `it goes with the division of a turn into ${division} parts, which an angle trisector ${trisector.reaches ? 'reaches' : 'does not reach either'} (Gleason)`;
    case 'order':
      return `an angle trisector does not help, as ${hasLargePrime(degree) ? 'the degree' : 'the order of the Galois group'} has a prime factor above 3 (Gleason)`;
    case 'cubic':
      return trisector.reaches
        ? 'an angle trisector as well reaches it, as every cubic that it needs has three real roots (Gleason)'
        : 'an angle trisector does not help, as a cubic that it needs has only one real root: like a cube root it takes a tool of another kind (Gleason)';
    case 'open':
      return `whether an angle trisector helps is not decided here, as ${WHY_OPEN[trisector.why]}`;
  }
}

function hasLargePrime(degree: number): boolean {
  let rest = degree;
  for (const prime of [2, 3]) while (rest % prime === 0) rest /= prime;
  return rest > 1;
}

function countRoots(roots: number | null): string {
  if (roots === null) return 'square roots';
  return roots === 1 ? 'one square root' : `${roots} square roots`;
}

export const TRANSCENDENTAL_REACH: Readonly<Reach> = Object.freeze({
  straightedgeAndCompass: false,
  withTrisector: false,
  reason:
    'It contains π and is transcendental (Lindemann), so neither straightedge and compass nor a trisector reaches it.',
});

/** Where the question itself went over a limit. */
export const OPEN_REACH: Readonly<Reach> = Object.freeze({
  straightedgeAndCompass: null,
  withTrisector: null,
  reason: 'Which tools reach it is not known: the question went over a limit.',
});

/** Reach of an angle given in turns, by Gauss and Wantzel, and by Gleason where a trisector is at hand. */
export function reachOfAngle(engine: Engine, turns: Num): Reach {
  const part = engine.asRational(turns);
  if (part === null) {
    return {
      straightedgeAndCompass: false,
      withTrisector: false,
      reason:
        'It is an irrational part of a turn, so its sine and cosine are transcendental (Gelfond and Schneider) and no such tools reach it.',
    };
  }
  const division = decideDivision(part.d);
  if (part.d <= 2n)
    return {
      straightedgeAndCompass: true,
      withTrisector: true,
      reason: 'It is a whole number of half turns, so straightedge and compass reach it.',
    };
  const parts = `the division of a turn into ${part.d} parts`;
  if (division.compass)
    return {
      straightedgeAndCompass: true,
      withTrisector: true,
      reason: `It belongs to ${parts}, which straightedge and compass reach because ${division.why} (Gauss and Wantzel).`,
    };
  const trisector =
    division.trisector === null
      ? `whether a trisector helps is left open, as a factor of ${part.d} went over the limit of trial division`
      : `an angle trisector as well ${division.trisector ? 'reaches it' : 'does not reach it either'} (Gleason)`;
  return {
    straightedgeAndCompass: false,
    withTrisector: division.trisector,
    reason: `It belongs to ${parts}, which straightedge and compass cannot reach because ${division.why} (Gauss and Wantzel); ${trisector}.`,
  };
}
