import { describe, expect, it } from 'vitest';
import { DEFAULT_SEARCH, type SearchLimits } from '@/lib/shop/candidate';
import { encloseArcsine, enclosePi } from '@/lib/shop/circular';
import { bisectionSearch } from '@/lib/shop/families/bisections';
import { classicalSearch } from '@/lib/shop/families/classical';
import { bestFractions, fractionSearch } from '@/lib/shop/families/fractions';
import { hypotenuseSearch } from '@/lib/shop/families/hypotenuses';
import { surdSearch } from '@/lib/shop/families/surds';
import { type Form, encloseForm } from '@/lib/shop/form';
import { IntervalArithmetic } from '@/lib/shop/interval';
import {
  cheapest,
  divide,
  hypotenuse,
  meanProportional,
  multiple,
  ratio,
  rootOfWhole,
  surd,
  sumStrikes,
  totalStrikes,
  writeStrikes,
  LINE,
  NONE,
} from '@/lib/shop/strikes';
import { closeRing } from '@/lib/shop/ring';
import { exactTarget, show, showLike, sideTarget } from './targets';

const BITS = 256;
const arithmetic = new IntervalArithmetic(BITS);
const pi = enclosePi(arithmetic);

const wantedFor = (
  ratioTo: { low: bigint; high: bigint },
  parts: number | null,
  limits: Partial<SearchLimits> = {},
) => ({
  arithmetic,
  ratio: ratioTo,
  base: 'radius',
  parts,
  limits: { ...DEFAULT_SEARCH, ...limits },
});
const side = (n: number) => sideTarget(n, 1n).enclose(BITS);

describe('best fractions', () => {
  const convergents = (greatest: number): string[] =>
    [...bestFractions(arithmetic, pi, greatest)].map(({ n, d }) => `${n}/${d}`);

  it('has the convergents of π among them, and ends at the denominator (OEIS A002485, A002486)', () => {
    const found = convergents(33_200);
    for (const known of ['3/1', '22/7', '333/106', '355/113', '103993/33102'])
      expect(found).toContain(known);
    expect(found).not.toContain('104348/33215');
    const order = found.filter((text) => ['3/1', '22/7', '333/106', '355/113'].includes(text));
    expect(order).toEqual(['3/1', '22/7', '333/106', '355/113']);
    expect(found.every((text) => Number(text.split('/')[1]) <= 33_200)).toBe(true);
    expect(convergents(112)).not.toContain('355/113');
  });

  it('ends at the fraction itself where the target is one, however it is enclosed', () => {
    for (const target of [
      { n: 3n, d: 8n },
      { n: 1n, d: 3n },
      { n: 355n, d: 113n },
      { n: 7n, d: 1n },
    ]) {
      const fractions = [...bestFractions(arithmetic, exactTarget(target).enclose(BITS), 100_000)];
      expect(fractions.at(-1)).toEqual(target);
    }
  });

  it('gives fractions in lowest terms, both below and above', () => {
    const fractions = [...bestFractions(arithmetic, side(7), 10_000)];
    const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
    expect(fractions.every(({ n, d }) => gcd(n, d) === 1n)).toBe(true);
    const below = fractions.filter(({ n, d }) => n << arithmetic.shift < side(7).low * d);
    expect(below.length).toBeGreaterThan(2);
    expect(below.length).toBeLessThan(fractions.length - 2);
  });
});

describe('rules of the trade', () => {
  const value = (form: Form) => encloseForm(arithmetic, form);
  const angleOf = (form: Form) => {
    const half = encloseArcsine(arithmetic, arithmetic.scale(value(form), 1n, 2n));
    return arithmetic.scale(arithmetic.divide(half, pi), 360n);
  };
  const rule = (n: number, source: string): Form => {
    const rules = [...classicalSearch(wantedFor(side(7), n)).candidates];
    const found = rules.find((candidate) => candidate.source?.startsWith(source));
    if (found === undefined) throw new Error(`No rule by ${source} for ${n}.`);
    return found.form;
  };
  const close = (interval: { low: bigint; high: bigint }, known: string) =>
    expect(showLike(interval, BITS, known)).toBe(known);

  // First central angles in degrees as computed to 60 digits from the descriptions in Freitas and Tavares,
  // "Dividing the circle", College Math. J. 49 (2018) 187-194.
  it.each([
    [5, '71.953453370585637447', '71.366133855499210876'],
    [7, '51.518222265720542999', '51.123285096456789057'],
    [9, '40.277813157607613096', '39.890744754575628634'],
    [11, '33.147937801849966591', '32.704049394388916581'],
    [13, '28.208009816877960864', '27.708115801689723030'],
  ])('Bion and Tempier give these angles for %i parts', (n, bion, tempier) => {
    close(angleOf(rule(n, 'Bion')), bion);
    close(angleOf(rule(n, 'Tempier')), tempier);
  });

  it('Bion is exact at 6 and Tempier at 12 (same article)', () => {
    close(angleOf(rule(6, 'Bion')), '60.000000000000000000');
    close(angleOf(rule(12, 'Tempier')), '30.000000000000000000');
  });

  it('Dürer: 39.594…° for nine (tan of the half is (√35 - 3√3)/2), 32.6696…° for eleven (9/16, cos 431/512)', () => {
    close(angleOf(rule(9, 'Dürer')), '39.594068226860461444');
    close(angleOf(rule(11, 'Dürer')), '32.669645561371989794');
  });

  it('Kochański, Archimedes and Zu Chongzhi give these values for π (Acta Eruditorum 1685; common practice)', () => {
    close(value(rule(7, 'Kochański')), '3.1415333387050946186');
    close(value(rule(7, 'Archimedes')), '3.1428571428571428571');
    close(value(rule(7, 'Zu Chongzhi')), '3.1415929203539823009');
  });

  // Side over radius of the true heptagon and the gap after seven steps, common practice; computed to 60 digits.
  it.each([
    [{ kind: 'surd', a: 0n, b: 1n, c: 3n, d: 2n } as const, '0.7753'],
    [{ kind: 'fraction', n: 13n, d: 15n } as const, '0.4900'],
    [{ kind: 'hypotenuse', p: 6n, q: 5n, d: 9n } as const, '-0.0169'],
  ])('seven parts by %o leave this gap in degrees', (form, gap) => {
    const opening = value(form);
    const closing = closeRing({
      arithmetic,
      radius: { low: arithmetic.one, high: arithmetic.one },
      opening,
      parts: 7,
    });
    if (closing?.kind !== 'ring') throw new Error('A ring was expected.');
    expect(show(closing.gap, BITS, 4)).toBe(gap);
  });

  // Relative errors of right triangles, computed to 60 digits.
  it.each([
    [7, 6n, 5n, 9n, '0.0000438'],
    [9, 12n, 5n, 19n, '0.0002489'],
    [13, 10n, 1n, 21n, '-0.0001375'],
  ])('for %i parts the triangle %i, %i over %i is off by this part', (n, p, q, d, relative) => {
    const error = arithmetic.subtract(value({ kind: 'hypotenuse', p, q, d }), side(n));
    expect(show(arithmetic.divide(error, side(n)), BITS, 7)).toBe(relative);
  });

  it('takes the division next to the target where none was named', () => {
    const search = classicalSearch(wantedFor(side(11), null));
    expect(search.ranges).toContain('division into 11');
    expect(classicalSearch(wantedFor(pi, null)).ranges).not.toContain('division into');
  });
});

describe('what the families range over', () => {
  it('puts the two nearest legs around the target, none beyond the limits', () => {
    const candidates = [
      ...hypotenuseSearch(wantedFor(side(7), 7, { parts: 9, leg: 8 })).candidates,
    ];
    const forms = candidates.map(({ form }) => form);
    expect(forms).toContainEqual({ kind: 'hypotenuse', p: 6n, q: 5n, d: 9n });
    for (const form of forms) {
      if (form.kind !== 'hypotenuse') throw new Error('Only right triangles were expected.');
      expect(form.p <= 8n && form.q <= form.p && form.q >= 1n && form.d <= 9n).toBe(true);
    }
  });

  it('keeps surds positive and in lowest terms', () => {
    const target = exactTarget({ n: 1n, d: 1000n }).enclose(BITS);
    const candidates = [...surdSearch(wantedFor(target, null)).candidates];
    expect(candidates.length).toBeGreaterThan(1000);
    for (const { form } of candidates) expect(encloseForm(arithmetic, form).low > 0n).toBe(true);
  });

  it('finds a chord of a reachable division among the bisections, with its own k and n', () => {
    const chord = encloseForm(arithmetic, { kind: 'chord', k: 5n, n: 48n });
    const forms = [...bisectionSearch(wantedFor(chord, null), 'chord').candidates].map(
      ({ form }) => form,
    );
    expect(forms).toContainEqual({ kind: 'chord', k: 5n, n: 48n });
    const angles = [...bisectionSearch(wantedFor(chord, null), 'angle').candidates];
    expect(angles.every(({ form }) => form.kind === 'fraction')).toBe(true);
    expect([...bisectionSearch(wantedFor(pi, null), 'chord').candidates]).toEqual([]);
  });

  it('tells each candidate in one sentence', () => {
    const wanted = wantedFor(side(7), 7);
    for (const search of [
      fractionSearch(wanted),
      hypotenuseSearch(wanted),
      surdSearch(wanted),
      bisectionSearch(wanted, 'chord'),
      classicalSearch(wanted),
    ])
      for (const candidate of search.candidates)
        expect(candidate.how()).toMatch(/^[√(A-Z0-9][^\n]*\.$/u);
  });
});

describe('counts of strikes', () => {
  it('adds, compares and writes them', () => {
    expect(writeStrikes(NONE)).toBe('0');
    expect(writeStrikes(sumStrikes(LINE, LINE))).toBe('4S1+2S2');
    expect(totalStrikes(cheapest(LINE, NONE))).toBe(0);
  });

  it('counts the base itself as nothing, a bisection as 2S1+S2+2C1+2C3 (Lemoine; Weisstein, "Geometrography")', () => {
    expect(ratio(1n, 1n)).toEqual(NONE);
    expect(writeStrikes(divide(2n))).toBe('2S1+S2+2C1+2C3');
    expect(writeStrikes(divide(4n))).toBe('4S1+2S2+4C1+4C3');
  });

  it('steps small multiples and doubles large ones, so the count grows like the logarithm', () => {
    expect(writeStrikes(multiple(3n))).toBe('3C1+2C3');
    for (const p of [10n ** 3n, 10n ** 6n, 10n ** 30n])
      expect(totalStrikes(multiple(p))).toBeLessThan(7 * p.toString(2).length);
  });

  it('takes √3 from two crossing circles and √2 from a right triangle', () => {
    expect(writeStrikes(rootOfWhole(3n))).toBe('3C1+2C3');
    expect(rootOfWhole(2n)).toEqual(hypotenuse(1n, 1n, 1n));
    for (let c = 2n; c < 60n; c += 1n)
      expect(totalStrikes(rootOfWhole(c))).toBeLessThanOrEqual(
        totalStrikes(meanProportional(c, 1n)),
      );
  });

  it('counts the 17-gon as DeTemple does, 8S1+4S2+22C1+11C3, and the pentagon 2S1+S2+8C1+4C3 (Monthly 98, 1991)', () => {
    const strikesOf = (k: bigint, n: bigint) => {
      const chord = encloseForm(arithmetic, { kind: 'chord', k, n });
      const found = [...bisectionSearch(wantedFor(chord, null), 'chord').candidates].find(
        ({ form }) => form.kind === 'chord' && form.k === k && form.n === n,
      );
      return found === undefined ? 'none' : writeStrikes(found.strikes());
    };
    expect(strikesOf(1n, 17n)).toBe('8S1+4S2+22C1+11C3');
    expect(strikesOf(1n, 5n)).toBe('2S1+S2+8C1+4C3');
    expect(strikesOf(1n, 10n)).toBe('4S1+2S2+10C1+6C3');
  });

  it('asks more for more: a multiple, a sum and a division each add', () => {
    const root = rootOfWhole(5n);
    const plain = totalStrikes(surd(0n, 1n, root, 1n));
    expect(totalStrikes(surd(0n, 2n, root, 1n))).toBeGreaterThan(plain);
    expect(totalStrikes(surd(1n, 1n, root, 1n))).toBeGreaterThan(plain);
    expect(totalStrikes(surd(0n, 1n, root, 3n))).toBeGreaterThan(plain);
    expect(surd(-1n, -2n, root, 3n)).toEqual(surd(1n, 2n, root, 3n));
  });
});
