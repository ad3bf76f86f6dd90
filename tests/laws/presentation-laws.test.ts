import Decimal from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { refusal } from '../../lib/certificate-check/verify.mjs';
import { createEngine, type Engine, type Num } from '../../lib/engine/index';
import { show, trees, valueOf, type Tree } from '../arbitraries/expressions';
import { evaluateWith } from '../engine/expression';

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

const RUNS = { numRuns: 50 };
const KINDS: [string, fc.Arbitrary<Tree>][] = [
  ['depth 1', trees(1)],
  ['depth 2', trees(2)],
  ['complex numbers of depth 1', trees(1, true)],
];

/** The value by decimal.js at 220 digits, real trees only; null where a root of a negative number would be taken. */
function approximate(t: Tree): Decimal | null {
  const D = Decimal.clone({ precision: 220 });
  const walk = (u: Tree): Decimal | null => {
    if (u.op === 'integer') return new D(u.n);
    if (u.op === 'i') return null;
    if (u.op === 'sqrt') {
      const a = walk(u.a);
      return a === null || a.isNegative() ? null : a.sqrt();
    }
    const a = walk(u.a);
    const b = walk(u.b);
    if (a === null || b === null) return null;
    if (u.op === '/') return b.abs().lt('1e-100') ? null : a.div(b);
    return u.op === '+' ? a.add(b) : u.op === '-' ? a.sub(b) : a.mul(b);
  };
  return walk(t);
}

describe.each(KINDS)('values in writing, %s', (_, arbitrary) => {
  it('text parses back to the value and is written the same again, also by another engine', () => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          const text = e.write(a).text;
          const back = evaluateWith(e, text);
          expect(e.equal(back, a)).toBe(true);
          expect(e.write(back).text).toBe(text);
          const other = createEngine();
          expect(other.write(evaluateWith(other, text)).text).toBe(text);
        });
      }),
      RUNS,
    );
  });

  it('the minimal polynomial vanishes at the value and has its degree', () => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          const p = e.minimalPolynomial(a);
          expect(p.length - 1).toBe(e.degree(a));
          let v = e.integer(0);
          for (const c of p) v = e.add(e.mul(v, a), e.integer(c));
          expect(e.isZero(v)).toBe(true);
          expect(p[0]).toBeGreaterThan(0n);
        });
      }),
      RUNS,
    );
  });

  it('the polynomials of the inverse and of the opposite are the reverse and the alternation, up to sign', () => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          if (e.isZero(a)) return;
          const p = e.minimalPolynomial(a);
          const positive = (q: bigint[]): string =>
            q.map((c) => ((q[0] as bigint) < 0n ? -c : c)).join();
          expect(e.minimalPolynomial(e.inverse(a)).join()).toBe(positive([...p].reverse()));
          expect(e.minimalPolynomial(e.neg(a)).join()).toBe(
            positive(p.map((c, i) => (i % 2 === 0 ? c : -c))),
          );
          expect(e.minimalPolynomial(e.conj(a)).join()).toBe(p.join());
        });
      }),
      RUNS,
    );
  });

  it('the certificate survives JSON and is accepted', () => {
    fc.assert(
      fc.property(arbitrary, (t) => {
        law([t], (e, a) => {
          expect(refusal(JSON.parse(JSON.stringify(e.certificate(a))))).toBeNull();
        });
      }),
      { numRuns: 25 },
    );
  });
});

describe('the order in which roots arrive', () => {
  it.each(KINDS)('changes nothing in what is written, %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary, arbitrary, arbitrary, (s, t, u) => {
        let first = '';
        law([s, t], (e, a, b) => {
          first = e.write(e.add(a, b)).text;
        });
        law([u, t, s], (e, c, b, a) => {
          e.mul(c, b);
          expect(e.write(e.add(b, a)).text).toBe(first);
        });
      }),
      RUNS,
    );
  });
});

describe('order and decimals', () => {
  it('agree with 200-digit arithmetic where that can tell', () => {
    fc.assert(
      fc.property(trees(2), trees(2), (s, t) => {
        const x = approximate(s);
        const y = approximate(t);
        fc.pre(x !== null && y !== null);
        law([s, t], (e, a, b) => {
          const d = x.sub(y);
          if (d.abs().gt('1e-150')) expect(e.compare(a, b)).toBe(d.isNegative() ? -1 : 1);
          else expect(e.compare(a, b)).toBe(0);
          if (x.abs().gt('1e-100')) {
            const digits = e.decimal(a, 40).re;
            expect(new Decimal(digits).eq(x.toSignificantDigits(40, Decimal.ROUND_HALF_EVEN))).toBe(
              true,
            );
            expect(e.floor(a)).toBe(BigInt(x.floor().toFixed(0)));
          }
        });
      }),
      RUNS,
    );
  });

  it('is total: exactly one of less, equal, greater, and it is kept by adding', () => {
    fc.assert(
      fc.property(trees(1), trees(1), trees(1), (s, t, u) => {
        law([s, t, u], (e, x, y, z) => {
          const [a, b, c] = [e.abs(x), e.abs(y), e.abs(z)];
          const order = e.compare(a, b);
          expect(e.compare(b, a)).toBe(order === 0 ? 0 : -order);
          expect(e.compare(e.add(a, c), e.add(b, c))).toBe(order);
          expect(order === 0).toBe(e.equal(a, b));
        });
      }),
      RUNS,
    );
  });
});
