import { describe, expect, test } from 'vitest';
import { carlyleCircle, chainRows, divisionSteps, quadraticChain } from '@/lib/divisions';
import { floorSqrt } from '@/lib/divisions/carlyle';
import { leastInverse } from '@/lib/divisions/numbers';

const kindsOf = (n: number) => divisionSteps(n)?.map(({ kind, parts }) => `${kind} ${parts}`);

describe('the steps of a division', () => {
  test('come in order: Fermat primes, their combination, points opposite, halves', () => {
    expect(kindsOf(60)).toEqual(['third 3', 'chain 5', 'combine 15', 'opposite 30', 'halve 60']);
    expect(kindsOf(8)).toEqual(['diameter 2', 'right-angle 4', 'halve 8']);
    expect(kindsOf(17)).toEqual(['chain 17']);
    expect(kindsOf(771)).toEqual(['third 3', 'chain 257', 'combine 771']);
    expect(kindsOf(1)).toEqual([]);
  });

  test('there are none where straightedge and compass do not reach', () => {
    for (const n of [7, 9, 25, 289, 1_000_000]) expect(divisionSteps(n)).toBeNull();
  });

  test('every combination is a true equation between parts of a turn', () => {
    for (const n of [15, 51, 85, 255, 257 * 15, 65535, 196_611, 983_055]) {
      for (const { kind, words, parts } of divisionSteps(n) ?? []) {
        if (kind !== 'combine') continue;
        const [on, back, left] = [...words.matchAll(/(\d+)\/(\d+)/g)].map(
          ([, over, under]) => [BigInt(over ?? 0), BigInt(under ?? 0)] as const,
        );
        if (!on || !back || !left) throw new Error(words);
        expect(left).toEqual([1n, BigInt(parts)]);
        expect((on[0] * back[1] - back[0] * on[1]) * left[1]).toBe(on[1] * back[1]);
        expect(on[0] > 0n && back[0] > 0n).toBe(true);
      }
    }
  });

  test('fifteen parts are two fifths less a third', () => {
    const step = divisionSteps(15)?.at(-1);
    expect(step?.words).toBe(
      '15 parts: go 2/5 of a turn forwards from the datum and 1/3 back. What is left is 1/15 of a turn.',
    );
    expect(step?.tex).toContain('\\tfrac{1}{15}=\\tfrac{2}{5}-\\tfrac{1}{3}');
  });

  test('the circle of a halving meets the axis in ±2cos(π/n)', () => {
    // x² = 2 + 2cos θ: centre on the y-axis, so the root is √(radius² − height²).
    for (const step of divisionSteps(1024) ?? []) {
      if (!step.circle) continue;
      const { centre, radius } = step.circle;
      expect(centre.x).toBe('0');
      const root = Math.sqrt(Number(radius) ** 2 - Number(centre.y) ** 2);
      expect(root).toBeCloseTo(2 * Math.cos((2 * Math.PI) / step.parts), 8);
    }
  });

  test('the least inverse is one, and no larger than half the modulus', () => {
    for (const m of [3, 5, 15, 17, 255, 257, 65535]) {
      for (const a of [2, 4, 7, 19, 257 * 2 + 1, 65537]) {
        if (gcd(a, m) !== 1) continue;
        const u = leastInverse(a, m);
        expect((((u * a) % m) + m) % m).toBe(1);
        expect(2 * Math.abs(u)).toBeLessThanOrEqual(m);
      }
    }
  });
});

describe('Carlyle circles', () => {
  test('of the first quadratic for 17, x² + x − 4', () => {
    const [row] = chainRows(quadraticChain(17), { count: 1 });
    expect(row).toMatchObject({
      tex: 'x^2+x-4=0',
      larger: '1.56155281281',
      smaller: '-2.56155281281',
      circle: { centre: { x: '-0.5', y: '-1.5' }, radius: '2.5495097568' },
    });
  });

  test.each([5, 17, 257] as const)('for %i all meet the x-axis in both roots', (p) => {
    for (const { circle, larger, smaller } of chainRows(quadraticChain(p))) {
      const [x, y, r] = [circle.centre.x, circle.centre.y, circle.radius].map(Number);
      if (x === undefined || y === undefined || r === undefined) throw new Error('no circle');
      for (const root of [larger, smaller].map(Number)) {
        expect(Math.hypot(root - x, y) / r).toBeCloseTo(1, 8);
      }
    }
  });

  test('pass through (0, 1)', () => {
    for (const { circle } of chainRows(quadraticChain(257))) {
      const [x, y, r] = [circle.centre.x, circle.centre.y, circle.radius].map(Number);
      expect(Math.hypot(x ?? 0, (y ?? 0) - 1) / (r ?? 0)).toBeCloseTo(1, 8);
    }
  });

  test('exact coefficients give exact circles', () => {
    const exact = (value: bigint) => (bits: number) => ({
      value: value << BigInt(bits),
      error: 0n,
    });
    const [s, p] = [exact(4n), exact(-2n)];
    const circle = carlyleCircle((bits) => ({ sum: s(bits), product: p(bits) }), 10);
    expect(circle).toEqual({ centre: { x: '2', y: '-0.5' }, radius: '2.5' });
  });

  test('rest on square roots of integers that are right to the unit', () => {
    for (const n of [0n, 1n, 2n, 3n, 4n, 15n, 16n, 17n, 10n ** 40n, 10n ** 40n - 1n, 2n ** 127n]) {
      const root = floorSqrt(n);
      expect(root * root <= n && n < (root + 1n) * (root + 1n)).toBe(true);
    }
  });
});

function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}
