import { createRequire } from 'node:module';

interface Equation {
  solveFor: (unknown: string) => unknown;
}

/** Loaded at the first equation that needs it: few do, and it takes as long to load as a child to start. */
const load = (): ((equation: string) => Equation) =>
  createRequire(import.meta.url)('nerdamer/all.js') as (equation: string) => Equation;

/**
 * Candidates for the unknown `x` of an equation in `x` and `k1`, `k2`, …, as texts.
 * They are guesses: some are wrong, some are decimals in disguise, some solutions are missing. The caller verifies each
 * one exactly. It can take for ever, so it runs only in a child process that the clock ends.
 */
export function proposeSolutions(equation: string): string[] {
  try {
    const found = load()(equation).solveFor('x');
    const list: unknown[] = Array.isArray(found) ? found : [found];
    return list.map(String);
  } catch {
    // Whatever stops the search, there is no candidate.
    return [];
  }
}
