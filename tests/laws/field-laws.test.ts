import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num } from '../../lib/engine/index';
import { show, trees, valueOf, type Tree } from '../arbitraries/expressions';

/**
 * Runs a law on values of trees, all in one engine. Trees that divide by an exact zero are passed over; a limit fails the law.
 */
function law(names: Tree[], check: (e: Engine, ...values: Num[]) => void): void {
  const e = createEngine();
  const outcome = e.attempt(() => {
    check(e, ...names.map((t) => valueOf(e, t)));
  });
  if (outcome.kind === 'outside-domain') fc.pre(outcome.code !== 'division-by-zero');
  expect(
    outcome.kind === 'value'
      ? 'value'
      : `${outcome.kind}: ${outcome.message} (${names.map(show).join(', ')})`,
  ).toBe('value');
}

const RUNS = { numRuns: 60 };

describe.each([
  ['depth 1', trees(1)],
  ['depth 2', trees(2)],
  ['complex numbers of depth 1', trees(1, true)],
])('the field laws on %s', (_, arbitrary) => {
  const three = fc.tuple(arbitrary, arbitrary, arbitrary);

  it('addition is associative and commutative', () => {
    fc.assert(
      fc.property(three, (ts) => {
        law(ts, (e, a, b, c) => {
          expect(e.equal(e.add(e.add(a, b), c), e.add(a, e.add(c, b)))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('multiplication distributes over addition', () => {
    fc.assert(
      fc.property(three, (ts) => {
        law(ts, (e, a, b, c) => {
          expect(e.equal(e.mul(a, e.add(b, c)), e.add(e.mul(c, a), e.mul(b, a)))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('a quotient times its divisor is the dividend', () => {
    fc.assert(
      fc.property(arbitrary, arbitrary, (s, t) => {
        law([s, t], (e, a, b) => {
          if (!e.isZero(b)) expect(e.equal(e.mul(e.div(a, b), b), a)).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the difference of a value with itself is zero, and equality agrees with it', () => {
    fc.assert(
      fc.property(arbitrary, arbitrary, (s, t) => {
        law([s, t], (e, a, b) => {
          expect(e.isZero(e.sub(a, a))).toBe(true);
          expect(e.equal(a, b)).toBe(e.isZero(e.sub(a, b)));
        });
      }),
      RUNS,
    );
  });
});

describe('square roots', () => {
  it.each([
    ['depth 2', trees(2)],
    ['depth 3', trees(3)],
    ['complex numbers of depth 1', trees(1, true)],
  ])('the root of a square is the value or its opposite, %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          const r = e.sqrt(e.mul(a, a));
          expect(e.equal(r, a) || e.equal(r, e.neg(a))).toBe(true);
          const sign = e.sign(e.re(r));
          expect(sign > 0 || (sign === 0 && e.sign(e.im(r)) >= 0)).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it.each([
    ['depth 2', trees(2)],
    ['complex numbers of depth 1', trees(1, true)],
  ])('the square of a root is the value, and the root is principal, %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          const r = e.sqrt(a);
          expect(e.equal(e.mul(r, r), a)).toBe(true);
          const sign = e.sign(e.re(r));
          expect(sign > 0 || (sign === 0 && e.sign(e.im(r)) >= 0)).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the root of a product of positive numbers is the product of the roots', () => {
    fc.assert(
      fc.property(trees(2), trees(2), (s, t) => {
        law([s, t], (e, x, y) => {
          const a = e.abs(x);
          const b = e.abs(y);
          expect(e.equal(e.sqrt(e.mul(a, b)), e.mul(e.sqrt(a), e.sqrt(b)))).toBe(true);
        });
      }),
      RUNS,
    );
  });
});

describe('absolute value and conjugate', () => {
  it('multiply to the square of the absolute value', () => {
    fc.assert(
      fc.property(trees(1, true), (t) => {
        law([t], (e, a) => {
          const m = e.abs(a);
          expect(e.sign(m)).toBe(e.isZero(a) ? 0 : 1);
          expect(e.equal(e.mul(a, e.conj(a)), e.mul(m, m))).toBe(true);
          expect(e.equal(e.add(e.re(a), e.mul(e.i, e.im(a))), a)).toBe(true);
        });
      }),
      RUNS,
    );
  });
});
