import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num, type Outcome } from '../../lib/engine/index';

const valueOf = <T>(outcome: Outcome<T>): T => {
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return outcome.value;
};

/** Runs one computation in a fresh engine and writes its outcome. */
const textOf = (work: (engine: Engine) => Num): string => {
  const engine = createEngine();
  return valueOf(engine.attempt(() => engine.write(work(engine)).text));
};

const root = (engine: Engine, n: number, index: number): Num =>
  engine.realRoot(engine.integer(n), index);

describe('cosines of divisions that square roots do not reach', () => {
  it('have degree φ(n)/2 and vanish in their closed-form polynomial (Lehmer 1933)', () => {
    const totient = (n: number): number =>
      Array.from({ length: n }, (_, k) => k + 1).filter((k) => {
        let [a, b] = [k, n];
        while (b !== 0) [a, b] = [b, a % b];
        return a === 1;
      }).length;
    const engine = createEngine();
    for (const n of [7, 9, 11, 13, 14, 18, 19, 21, 25, 36, 45, 70]) {
      const cosine = valueOf(engine.attempt(() => engine.cosTurn(1n, BigInt(n))));
      const f = valueOf(engine.attempt(() => engine.minimalPolynomial(cosine)));
      expect(f.length - 1).toBe(totient(n) / 2);
      expect(engine.degree(cosine)).toBe(totient(n) / 2);
      if (n > 9) continue;
      const isZero = engine.attempt(() =>
        engine.isZero(
          f.reduce<Num>(
            (sum, c) => engine.add(engine.mul(sum, cosine), engine.integer(c)),
            engine.integer(0),
          ),
        ),
      );
      expect(valueOf(isZero)).toBe(true);
    }
  });

  it('come back from identities as what they are', () => {
    // Classical identities; Gauss, Disquisitiones arithmeticae, art. 362 for sums over a division.
    expect(
      textOf((e) => e.mul(e.mul(e.cosTurn(1n, 7n), e.cosTurn(2n, 7n)), e.cosTurn(3n, 7n))),
    ).toBe('1/8');
    expect(
      textOf((e) => e.add(e.sub(e.cosTurn(1n, 14n), e.cosTurn(1n, 7n)), e.cosTurn(3n, 14n))),
    ).toBe('1/2');
    const tan = (e: Engine, k: bigint): Num => e.div(e.sinTurn(k, 18n), e.cosTurn(k, 18n));
    expect(textOf((e) => e.mul(e.mul(tan(e, 1n), tan(e, 2n)), tan(e, 4n)))).toBe('sqrt(3)');
  });

  it('give √11 out of a tangent and a sine of the elevenths (a classical identity, from memory)', () => {
    expect(
      textOf((e) =>
        e.add(
          e.div(e.sinTurn(3n, 22n), e.cosTurn(3n, 22n)),
          e.mul(e.integer(4), e.sinTurn(1n, 11n)),
        ),
      ),
    ).toBe('sqrt(11)');
  });

  it('have the digits that the recurrence of the cosine gives', () => {
    // 20 digits of cos(2π/7): computed to 60 digits outside the engine.
    const engine = createEngine();
    const cosine = engine.cosTurn(1n, 7n);
    expect(engine.decimal(cosine, 20).re).toBe('0.62348980185873353053');
    expect(engine.decimal(engine.mul(engine.integer(900), engine.sinTurn(1n, 14n)), 12).re).toBe(
      '390.495365206',
    );
  });

  it('are told apart and ordered among each other', () => {
    const engine = createEngine();
    const order = [1n, 2n, 3n, 4n, 5n].map((k) => engine.cosTurn(k, 11n));
    for (let k = 1; k < order.length; k++) {
      expect(engine.compare(order[k] as Num, order[k - 1] as Num)).toBe(-1);
      expect(engine.equal(order[k] as Num, order[k - 1] as Num)).toBe(false);
    }
    expect(engine.equal(engine.cosTurn(1n, 11n), engine.cosTurn(10n, 11n))).toBe(true);
  });
});

describe('roots of unity', () => {
  it('are recognised with their part of a turn, whichever division', () => {
    const engine = createEngine();
    for (const [k, n] of [
      [0n, 1n],
      [1n, 2n],
      [3n, 4n],
      [2n, 5n],
      [4n, 7n],
      [8n, 9n],
      [7n, 12n],
      [11n, 17n],
    ] as const) {
      const value = engine.rootOfUnity(k, n);
      expect(engine.partOfTurn(value)).toEqual({ k, n });
    }
    expect(engine.partOfTurn(engine.rootOfUnity(6n, 14n))).toEqual({ k: 3n, n: 7n });
  });

  it('are not seen where there are none', () => {
    const engine = createEngine();
    const plain = [
      engine.integer(0),
      engine.integer(2),
      engine.sqrt(engine.integer(2)),
      // On the unit circle and no root of unity: (3 + 4i)/5.
      engine.div(
        engine.add(engine.integer(3), engine.mul(engine.integer(4), engine.i)),
        engine.integer(5),
      ),
    ];
    for (const value of plain) expect(engine.partOfTurn(value)).toBeNull();
  });
});

describe('roots of higher index', () => {
  it('come back as square roots where those reach them', () => {
    expect(
      textOf((e) => {
        const s = e.sqrt(e.integer(5));
        return e.add(e.realRoot(e.add(e.integer(2), s), 3), e.realRoot(e.sub(e.integer(2), s), 3));
      }),
    ).toBe('1');
    expect(
      textOf((e) => e.realRoot(e.add(e.integer(7), e.mul(e.integer(5), e.sqrt(e.integer(2)))), 3)),
    ).toBe('1+sqrt(2)');
    expect(textOf((e) => root(e, 64, 6))).toBe('2');
    expect(textOf((e) => root(e, 4, 4))).toBe('sqrt(2)');
  });

  it('are written with what can be pulled out', () => {
    expect(textOf((e) => root(e, 2, 3))).toBe('cbrt(2)');
    expect(textOf((e) => root(e, -54, 3))).toBe('-3*cbrt(2)');
    expect(textOf((e) => e.realRoot(e.rational(1n, 2n), 3))).toBe('cbrt(4)/2');
    expect(textOf((e) => e.add(e.integer(1), root(e, 2, 5)))).toBe('1+2^(1/5)');
  });

  it('obey the field laws with square roots mixed in', () => {
    const engine = createEngine();
    const values = [
      root(engine, 2, 3),
      engine.cosTurn(1n, 7n),
      engine.sqrt(engine.integer(2)),
      engine.add(engine.i, root(engine, 3, 3)),
    ];
    const same = (a: Num, b: Num): void => {
      expect(valueOf(engine.attempt(() => engine.equal(a, b)))).toBe(true);
    };
    for (const a of values) {
      same(engine.mul(a, engine.inverse(a)), engine.integer(1));
      same(engine.sub(a, a), engine.integer(0));
      same(engine.pow(a, 2n), engine.mul(a, a));
      same(engine.add(engine.re(a), engine.mul(engine.i, engine.im(a))), a);
      for (const b of values.slice(0, 3)) {
        same(engine.add(a, b), engine.add(b, a));
        same(engine.mul(a, b), engine.mul(b, a));
        same(engine.sub(engine.add(a, b), b), a);
      }
    }
  });

  it('have no value for an even index below zero', () => {
    const engine = createEngine();
    expect(engine.attempt(() => root(engine, -2, 4))).toMatchObject({
      kind: 'outside-domain',
      code: 'domain',
    });
  });
});

describe('roots of polynomials', () => {
  const near = (coefficients: bigint[], place: number): string =>
    textOf((e) => e.nearestRoot(coefficients, e.integer(place)));

  it('are nested square roots exactly when the Galois group is a 2-group', () => {
    // Galois groups by PARI/GP 2.15.2 polgalois: V4, D4, C4, E8.
    expect(near([1n, 0n, -10n, 0n, 1n], 3)).toBe('sqrt(2)+sqrt(3)');
    expect(near([1n, 0n, 0n, -4n, -1n], 2)).toBe('(sqrt(2)+sqrt(4*sqrt(2)-2))/2');
    expect(near([1n, 0n, -5n, 0n, 5n], 2)).toBe('sqrt(10+2*sqrt(5))/2');
    expect(near([1n, 0n, -40n, 0n, 352n, 0n, -960n, 0n, 576n], 5)).toBe('sqrt(2)+sqrt(3)+sqrt(5)');
  });

  it('are refused with a witness when the degree is a power of two and the group is not', () => {
    // x⁴−x−1 has the group S4, x⁴+8x+12 the group A4 (PARI/GP 2.15.2 polgalois).
    for (const f of [
      [1n, 0n, 0n, -1n, -1n],
      [1n, 0n, 0n, 8n, 12n],
    ]) {
      const engine = createEngine();
      const place = engine.add(engine.integer(1), engine.i);
      const value = engine.nearestRoot(f, place);
      const reach = engine.reach(value);
      expect(reach.kind).toBe('splitting');
      if (reach.kind !== 'splitting') continue;
      expect(reach.splitting.degrees.reduce((sum, d) => sum + d, 0)).toBe(4);
      expect(reach.splitting.degrees.some((d) => d === 3)).toBe(true);
    }
  });

  it('answer with the minimal polynomial of the root itself when the polynomial splits', () => {
    const engine = createEngine();
    // (x² − 2)(x³ − 2), near 5/4.
    const value = engine.nearestRoot([1n, 0n, -2n, -2n, 0n, 4n], engine.rational(5n, 4n));
    expect(engine.minimalPolynomial(value)).toEqual([1n, 0n, 0n, -2n]);
  });

  it('are chosen among all roots, complex ones included, and written so that they read back', () => {
    const engine = createEngine();
    const value = engine.nearestRoot([1n, 0n, 0n, -1n, 1n], engine.i);
    expect(engine.isReal(value)).toBe(false);
    expect(engine.decimal(value, 10)).toMatchObject({ re: '-0.7271360845', im: '0.9340992895' });
    expect(engine.write(value).text).toBe('root(x^4-x+1, -0.72+0.93*i)');
  });

  it('are asked for anew when two lie equally near', () => {
    const engine = createEngine();
    expect(
      engine.attempt(() => engine.nearestRoot([1n, 0n, -2n], engine.integer(0))),
    ).toMatchObject({
      kind: 'outside-domain',
      code: 'domain',
    });
  });
});

describe('an angle trisector', () => {
  const trisector = (work: (engine: Engine) => Num): boolean | null => {
    const engine = createEngine();
    const reach = engine.reach(work(engine));
    return reach.kind === 'constructible' ? true : reach.trisector.reaches;
  };

  it('reaches the divisions of Gleason (1988) and no others', () => {
    const reached = [7n, 9n, 13n, 14n, 18n, 19n, 21n, 26n, 27n, 28n];
    for (let n = 3n; n <= 28n; n++) {
      const engine = createEngine();
      const reach = engine.reach(engine.cosTurn(1n, n));
      if (reach.kind === 'constructible') continue;
      expect([n, reach.trisector.reaches]).toEqual([n, reached.includes(n)]);
    }
  });

  it('solves cubics with three real roots and none with one', () => {
    expect(trisector((e) => e.nearestRoot([1n, 0n, -3n, -1n], e.integer(2)))).toBe(true);
    expect(trisector((e) => root(e, 2, 3))).toBe(false);
    expect(trisector((e) => e.add(e.sqrt(e.integer(2)), root(e, 2, 3)))).toBe(false);
    expect(trisector((e) => e.sqrt(e.cosTurn(1n, 7n)))).toBe(true);
    expect(trisector((e) => e.add(e.sqrt(e.integer(61)), e.sinTurn(1n, 14n)))).toBe(true);
  });

  it('does not help where an order has a prime factor above 3', () => {
    expect(trisector((e) => e.nearestRoot([1n, 0n, 0n, 0n, -1n, -1n], e.integer(1)))).toBe(false);
    expect(trisector((e) => root(e, 2, 5))).toBe(false);
  });
});

describe('limits', () => {
  it('leave the verdict on square roots standing when the trisector is too much', () => {
    const engine = createEngine();
    const value = root(engine, 2, 48);
    expect(valueOf(engine.attempt(() => engine.reach(value)))).toMatchObject({
      kind: 'degree',
      degree: 48,
      trisector: { reaches: null, by: 'open', why: 'limit' },
    });
  });

  it('are named when a degree grows out of hand', () => {
    const engine = createEngine();
    const outcome = engine.attempt(() => engine.add(root(engine, 2, 19), root(engine, 3, 17)));
    expect(outcome).toMatchObject({ kind: 'over-limit', limit: 'degree', met: 323 });
  });

  it('keep numbers of other engines out', () => {
    const stranger = root(createEngine(), 2, 3);
    const engine = createEngine();
    expect(() => engine.add(stranger, engine.integer(1))).toThrow(TypeError);
  });
});
