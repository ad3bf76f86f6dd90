import type { Chain, Combination } from './chain';
import type { ChainCheck } from './check-chain';
import { lastLevel, primitiveRoot, type Period } from './periods';

/** [level, index] */
type PeriodPair = [number, number];

/** constant + Σ coefficient·η(level, index), the terms as [level, index, coefficient]. */
export interface ChainCombination {
  constant: number;
  terms: [number, number, number][];
}

/** A chain as a file: see README.md in this folder. */
export interface ChainDocument {
  format: 'surdwork-quadratic-chain';
  version: 1;
  prime: number;
  primitiveRoot: number;
  periods: string;
  target: PeriodPair;
  targetMeaning: string;
  count: number;
  check: ChainCheck | null;
  quadratics: {
    sum: ChainCombination;
    product: ChainCombination;
    larger: PeriodPair;
    smaller: PeriodPair;
  }[];
}

/** The plain data of a chain, with what was checked of it. */
export function chainDocument(chain: Chain, check: ChainCheck | null): ChainDocument {
  const { prime, target, quadratics } = chain;
  const last = lastLevel(prime);
  return {
    format: 'surdwork-quadratic-chain',
    version: 1,
    prime,
    primitiveRoot: primitiveRoot(prime),
    periods: `eta(k,j) is the sum of z^(g^(j+2^k*m)) for m = 0 ... ${prime - 1}/2^k - 1, where z = exp(2*pi*i/${prime}) and g is the primitive root; eta(0,0) = -1. Each quadratic is x^2 - sum*x + product = 0.`,
    target: pair(target),
    targetMeaning: `eta(${last},0) = 2*cos(2*pi/${prime})`,
    count: quadratics.length,
    check,
    quadratics: quadratics.map(({ sum, product, larger, smaller }) => ({
      sum: plain(sum),
      product: plain(product),
      larger: pair(larger),
      smaller: pair(smaller),
    })),
  };
}

function pair({ level, index }: Period): PeriodPair {
  return [level, index];
}

function plain({ constant, terms }: Combination): ChainCombination {
  return {
    constant,
    terms: terms.map(({ level, index, coefficient }) => [level, index, coefficient]),
  };
}
