/** Limits, the step budget, and the failures that `attempt` turns into data. */

import type { Limits } from './types';

/** Defaults: roomy for a setting-out notebook, and each is met within about a second on a small machine. */
export const DEFAULT_LIMITS: Readonly<Limits> = Object.freeze({
  integerBits: 200_000,
  towerHeight: 16,
  nesting: 24,
  terms: 20_000,
  degree: 256,
  digits: 10_000,
  steps: 6_000_000,
});

type OutsideCode = 'division-by-zero' | 'domain' | 'not-exact';
type LimitCode = 'limit-size' | 'limit-tower' | 'limit-digits' | 'limit-time';

/** The value does not exist, or does not exist in square roots. */
export class OutsideDomain extends Error {
  constructor(
    readonly code: OutsideCode,
    message: string,
  ) {
    super(message);
  }
}

/** A named limit was met. */
export class OverLimit extends Error {
  readonly code: LimitCode;
  readonly met: number;
  constructor(
    readonly limit: keyof Limits,
    readonly allowed: number,
    met: number,
    message?: string,
  ) {
    const whole = Math.min(Math.ceil(met), Number.MAX_SAFE_INTEGER);
    super(message ?? describe(limit, allowed, whole));
    this.code = CODES[limit];
    this.met = whole;
  }
}

const CODES: Record<keyof Limits, LimitCode> = {
  integerBits: 'limit-size',
  towerHeight: 'limit-tower',
  nesting: 'limit-tower',
  terms: 'limit-size',
  degree: 'limit-size',
  digits: 'limit-digits',
  steps: 'limit-time',
};

function describe(limit: keyof Limits, allowed: number, met: number): string {
  switch (limit) {
    case 'integerBits':
      return `An integer of about ${met} bits came up; the limit is ${allowed} bits.`;
    case 'towerHeight':
      return `The value needs ${met} nested square roots at once; the limit is ${allowed}.`;
    case 'nesting':
      return `Square roots are nested ${met} deep; the limit is ${allowed}.`;
    case 'terms':
      return `The value has ${met} terms written out; the limit is ${allowed}.`;
    case 'degree':
      return `The value has a degree of up to ${met}; the limit is ${allowed}.`;
    case 'digits':
      return `${met} digits were asked for; the limit is ${allowed}.`;
    case 'steps':
      return `The exact answer takes more than ${allowed} steps of work; that is the limit.`;
  }
}

/** Counts work. `charge` is called inside the loops with the size of the work about to be done. */
export class Budget {
  private spent = 0;
  constructor(readonly limits: Readonly<Limits>) {}

  /** Starts a new attempt. */
  reset(): void {
    this.spent = 0;
  }

  charge(steps: number): void {
    this.spent += steps;
    if (this.spent > this.limits.steps) {
      throw new OverLimit('steps', this.limits.steps, this.spent);
    }
  }

  /** Fails when `met` goes beyond the named limit. */
  within(limit: keyof Limits, met: number): void {
    if (met > this.limits[limit]) throw new OverLimit(limit, this.limits[limit], met);
  }
}
