import { describe, expect, it } from 'vitest';
import { evaluateExpression } from '../../lib/language/index';

const numberOf = (source: string) => {
  const result = evaluateExpression(source);
  if (result.kind !== 'number') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result;
};

describe('powers with a fraction as exponent', () => {
  it.each([
    // 20 digits of the principal values by PARI/GP 2.15.2, and algdep on 38 digits for the polynomials.
    ['(1+i)^(2/5)', '1.0924770557774537267', '0.35496731310463012599', 'x^10+4'],
    ['(-1)^(1/7)', '0.90096886790241912624', '0.43388373911755812048', 'x^6-x^5+x^4-x^3+x^2-x+1'],
    ['(-2)^(2/3)', '-0.79370052598409973738', '1.3747296369986026264', 'x^3-4'],
    ['(3-4i)^(1/3)', '1.6289371459221758752', '-0.52017450230454583955', 'x^6-6*x^3+25'],
    ['(2i)^(-3/7)', '0.58089855900748325540', '-0.46325114244860277869', '64*x^14+1'],
    ['(-5)^(1/9)', '1.1236968159165994910', '0.40899219333335038707', 'x^9+5'],
    ['cbrt(1+i)', '1.0842150814913511819', '0.29051455550725144450', 'x^6-2*x^3+2'],
  ])('give the principal value of %s', (source, re, im, polynomial) => {
    const result = evaluateExpression(source, { digits: 20 });
    expect(result).toMatchObject({ kind: 'number', real: false, decimal: { re, im } });
    const coefficients = numberOf(source).minimalPolynomial?.map(Number) ?? [];
    const written = coefficients
      .map((c, k) => {
        const power = coefficients.length - 1 - k;
        const x = power === 0 ? '' : power === 1 ? 'x' : `x^${power}`;
        if (c === 0) return '';
        const size = Math.abs(c) === 1 && power > 0 ? '' : `${Math.abs(c)}${power > 0 ? '*' : ''}`;
        return `${c < 0 ? '-' : '+'}${size}${x}`;
      })
      .join('');
    expect(written.replace(/^\+/, '')).toBe(polynomial);
  });

  it('come back as square roots where those reach them', () => {
    expect(numberOf('(-8)^(1/3)').exact.text).toBe('1+i*sqrt(3)');
    expect(numberOf('(-32)^(1/5)').exact.text).toBe('(1+sqrt(5)+i*sqrt(10-2*sqrt(5)))/2');
    expect(numberOf('((-1)^(1/7))^7').exact.text).toBe('-1');
    expect(numberOf('(-64)^(1/6)').exact.text).toBe('sqrt(3)+i');
  });

  it('take the branch on either side of the negative axis, however near the number lies to it', () => {
    expect(numberOf('im((-2 + i/10^30)^(1/3))').decimal.re).toMatch(/^1\.09/);
    expect(numberOf('im((-2 - i/10^30)^(1/3))').decimal.re).toMatch(/^-1\.09/);
    expect(numberOf('im((-2)^(1/3))').decimal.re).toMatch(/^1\.09/);
  });

  it('leave the cube root of a real number real, and share the dimension out', () => {
    expect(numberOf('cbrt(-8)').exact.text).toBe('-2');
    expect(numberOf('cbrt(-8 mm^3)')).toMatchObject({ unit: 'mm', exact: { text: '-2' } });
    expect(numberOf('(-8 mm^3)^(1/3)')).toMatchObject({ unit: 'mm', real: false });
    expect(evaluateExpression('(-8 mm^2)^(1/3)')).toMatchObject({
      error: { code: 'unit-mismatch' },
    });
  });

  it('name the limit where the index is too large or the degree', () => {
    expect(evaluateExpression('(-1)^(1/67)')).toMatchObject({ error: { code: 'limit-size' } });
    expect(evaluateExpression('(cbrt(2)+cbrt(3)+i)^(1/61)')).toMatchObject({
      error: { code: 'limit-size' },
    });
  });
});
