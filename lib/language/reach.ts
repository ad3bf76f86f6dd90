import type { Engine, Num } from '../engine/index';
import { decideDivision } from './divisions';
import type { Reach } from './result';

/** Reach of a value that the engine holds: it is made of square roots, so straightedge and compass reach it. */
export function reachOfConstructible(rational: boolean, roots: number | null): Reach {
  const reason = rational
    ? 'It is rational, so straightedge and compass reach it.'
    : `It is built from rational numbers by ${countRoots(roots)}, so straightedge and compass reach it.`;
  return { straightedgeAndCompass: true, withTrisector: true, reason };
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
