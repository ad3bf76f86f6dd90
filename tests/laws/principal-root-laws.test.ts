import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num } from '../../lib/engine/index';

const part = fc.tuple(fc.integer({ min: -12, max: 12 }), fc.integer({ min: 1, max: 6 }));
/** A rational complex number, not 0; a third of them lie on the negative axis. */
const base = fc
  .tuple(part, fc.oneof(part, fc.constant([0, 1] as [number, number]), part))
  .filter(([[re], [im]]) => re !== 0 || im !== 0);
const index = fc.integer({ min: 2, max: 7 });

function complex(e: Engine, [[a, b], [c, d]]: [[number, number], [number, number]]): Num {
  const fraction = (n: number, m: number): Num => e.rational(BigInt(n), BigInt(m));
  return e.add(fraction(a, b), e.mul(e.i, fraction(c, d)));
}

/** The argument to a double's digits; enough to tell roots apart that differ by 2π/index. */
function argumentOf(e: Engine, z: Num): number {
  const { re, im } = e.decimal(z, 20);
  return Math.atan2(Number(im ?? '0'), Number(re));
}

describe('the principal root', () => {
  it('to the power of its index is the number again, and its argument is that part of the argument in (-π, π]', () => {
    fc.assert(
      fc.property(base, index, (z, q) => {
        const e = createEngine({ steps: 100_000_000 });
        const outcome = e.attempt(() => {
          const value = complex(e, z);
          const root = e.principalRoot(value, q);
          expect(e.equal(e.pow(root, BigInt(q)), value)).toBe(true);
          expect(argumentOf(e, root)).toBeCloseTo(argumentOf(e, value) / q, 9);
        });
        expect(outcome.kind === 'value' ? '' : outcome.message).toBe('');
      }),
      { numRuns: 40 },
    );
  });

  it('of a root is the root of the product of the indices', () => {
    fc.assert(
      fc.property(base, (z) => {
        const e = createEngine({ steps: 100_000_000 });
        const outcome = e.attempt(() => {
          const value = complex(e, z);
          const nested = e.sqrt(e.principalRoot(value, 3));
          expect(e.equal(nested, e.principalRoot(value, 6))).toBe(true);
        });
        expect(outcome.kind === 'value' ? '' : outcome.message).toBe('');
      }),
      { numRuns: 15 },
    );
  });
});
