import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Engine, type Limits, type Num, createEngine } from '@/lib/engine/index';
import { trees, valueOf } from '../arbitraries/expressions';

/** All that is said of a number. */
function account(e: Engine, a: Num) {
  // How far beyond a limit a question goes may differ with what the engine knows already.
  const ask = <T>(work: () => T) => {
    const outcome = e.attempt(work);
    return outcome.kind === 'over-limit' ? outcome.limit : outcome;
  };
  return {
    written: ask(() => e.write(a)),
    decimal: ask(() => e.decimal(a, 25)),
    degree: ask(() => e.degree(a)),
    polynomial: ask(() => e.minimalPolynomial(a)),
    reach: ask(() => e.reach(a)),
    real: e.isReal(a),
    rational: e.asRational(a),
  };
}

/** The number in an engine that has seen other things before. */
function moved(from: Engine, a: Num, limits: Partial<Limits> = {}): { e: Engine; b: Num } {
  const e = createEngine(limits);
  e.attempt(() => e.sqrt(e.add(e.sqrt(e.integer(15)), e.sqrt(e.integer(6)))));
  const outcome = e.attempt(() => e.unpack(from.pack(a)));
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return { e, b: outcome.value };
}

const BEYOND: Record<string, (e: Engine) => Num> = {
  'cos of a 7th': (e) => e.cosTurn(1n, 7n),
  'cos of a 9th, scaled and moved': (e) =>
    e.add(e.mul(e.cosTurn(2n, 9n), e.rational(3n, 4n)), e.integer(5)),
  'cube root of 2': (e) => e.realRoot(e.integer(2), 3),
  'e^(2πi/7)': (e) => e.rootOfUnity(1n, 7n),
  'root of x⁵ − x − 1': (e) => e.nearestRoot([1n, 0n, 0n, 0n, -1n, -1n], e.integer(1)),
  '√2 + cube root of 3': (e) => e.add(e.sqrt(e.integer(2)), e.realRoot(e.integer(3), 3)),
  'cos of a 17th': (e) => e.cosTurn(3n, 17n),
  'cos of a 257th': (e) => e.cosTurn(1n, 257n),
  'sin of an 85th': (e) => e.sinTurn(2n, 85n),
  'nests with a common field': (e) =>
    e.add(
      e.sqrt(e.add(e.integer(2), e.sqrt(e.integer(2)))),
      e.sqrt(e.sub(e.integer(2), e.sqrt(e.integer(2)))),
    ),
};

describe('a number that is packed and taken into another engine', () => {
  it('is told apart in nothing, real or complex', () => {
    fc.assert(
      fc.property(trees(2, true), (tree) => {
        const e = createEngine({ steps: 300_000 });
        const made = e.attempt(() => valueOf(e, tree));
        if (made.kind !== 'value') return;
        const there = moved(e, made.value, { steps: 300_000 });
        expect(account(there.e, there.b)).toEqual(account(e, made.value));
      }),
      { numRuns: 100 },
    );
  });

  it.each(Object.entries(BEYOND))('%s is told apart in nothing', (_, make) => {
    const e = createEngine();
    const made = e.attempt(() => make(e));
    if (made.kind !== 'value') throw new Error(made.message);
    const there = moved(e, made.value);
    expect(account(there.e, there.b)).toEqual(account(e, made.value));
  });

  it('meets others there: packed parts add up to the packed sum', () => {
    fc.assert(
      fc.property(trees(2), trees(2), (left, right) => {
        const e = createEngine();
        const f = createEngine();
        const made = e.attempt(() => [valueOf(e, left), valueOf(e, right)] as const);
        if (made.kind !== 'value') return;
        const [a, b] = made.value;
        const same = f.attempt(() => {
          const sum = f.add(f.unpack(e.pack(a)), f.unpack(e.pack(b)));
          return f.equal(sum, f.unpack(e.pack(e.add(a, b))));
        });
        expect(same).toEqual({ kind: 'value', value: true });
      }),
      { numRuns: 100 },
    );
  });

  it('a number of another engine is not held before, and is after', () => {
    const [e, f] = [createEngine(), createEngine()];
    for (const a of [e.sqrt(e.integer(2)), e.cosTurn(1n, 7n), e.cosTurn(1n, 17n)]) {
      expect([e.holds(a), f.holds(a), f.holds(f.unpack(e.pack(a)))]).toEqual([true, false, true]);
    }
    for (const other of [null, undefined, 1n, 'x', {}, [], new Map()])
      expect(e.holds(other)).toBe(false);
  });
});
