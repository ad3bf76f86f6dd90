import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num, type Outcome } from '../../lib/engine/index';

const valueOf = <T>(outcome: Outcome<T>): T => {
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return outcome.value;
};

/** A nest of square roots: √(a + b·(inner)) or inner + √a, read from the innermost number out. */
type Layer = { readonly kind: 'over' | 'beside'; readonly a: number; readonly b: number };

const layer: fc.Arbitrary<Layer> = fc.record({
  kind: fc.constantFrom('over', 'over', 'beside'),
  a: fc.integer({ min: -6, max: 12 }),
  b: fc.constantFrom(1, -1, 2),
});

function build(engine: Engine, layers: readonly Layer[]): Num {
  return layers.reduce<Num>((inner, { kind, a, b }) => {
    if (kind === 'beside') return engine.add(inner, engine.sqrt(engine.integer(a)));
    return engine.sqrt(engine.add(engine.integer(a), engine.mul(engine.integer(b), inner)));
  }, engine.integer(2));
}

/** The value that the minimal polynomial and twelve digits alone give. */
function asRoot(engine: Engine, value: Num): Num {
  const { re, im } = engine.decimal(value, 12);
  const part = (digits: string | null): Num => {
    if (digits === null) return engine.integer(0);
    const [, sign = '', whole = '0', rest = '', power = '0'] =
      /^(-?)(\d+)(?:\.(\d+))?(?:e([+-]?\d+))?$/.exec(digits) ?? [];
    const n = BigInt(whole + rest) * (sign === '-' ? -1n : 1n);
    const shift = Number(power) - rest.length;
    return shift >= 0
      ? engine.integer(n * 10n ** BigInt(shift))
      : engine.rational(n, 10n ** BigInt(-shift));
  };
  const place = engine.add(part(re), engine.mul(engine.i, part(im)));
  return engine.nearestRoot(engine.minimalPolynomial(value), place);
}

describe('a nest of square roots given as the root of its minimal polynomial', () => {
  it('comes back as square roots and equals the nest, up to degree 16', () => {
    fc.assert(
      fc.property(fc.array(layer, { minLength: 2, maxLength: 4 }), (layers) => {
        const engine = createEngine();
        const nest = build(engine, layers);
        const degree = engine.degree(nest);
        fc.pre(degree >= 2 && degree <= 16);
        const back = valueOf(engine.attempt(() => asRoot(engine, nest)));
        expect(engine.reach(back)).toEqual({ kind: 'constructible' });
        expect(valueOf(engine.attempt(() => engine.equal(back, nest)))).toBe(true);
      }),
      { numRuns: 24, seed: 16 },
    );
  });

  it('comes back at degree 32: five layers, and five roots beside each other', () => {
    const engine = createEngine();
    const over = [2, 3, 5, 7].reduce<Num>(
      (inner, a) => engine.sqrt(engine.add(engine.integer(a), inner)),
      engine.sqrt(engine.integer(2)),
    );
    const beside = [2, 3, 5, 7, 11]
      .map((a) => engine.sqrt(engine.integer(a)))
      .reduce((a, b) => engine.add(a, b));
    for (const nest of [over, beside]) {
      expect(engine.degree(nest)).toBe(32);
      const back = valueOf(engine.attempt(() => asRoot(engine, nest)));
      expect(valueOf(engine.attempt(() => engine.equal(back, nest)))).toBe(true);
    }
  });
});
