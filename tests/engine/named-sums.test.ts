import { describe, expect, it } from 'vitest';
import { evaluateExpression } from '../../lib/language/index';

const written = (source: string): { text: string; tex: string } => {
  const result = evaluateExpression(source);
  if (result.kind !== 'number') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result.exact;
};

describe('numbers beyond square roots are written as they were made', () => {
  it.each([
    ['50*sqrt(61) - 900*sin(pi/7)', '50*sqrt(61)-900*sin(pi/7)'],
    ['1200*sin(pi/9) - 300*sqrt(2)', '1200*sin(pi/9)-300*sqrt(2)'],
    ['cos(4pi/7)/3 + sqrt(2)*cos(2pi/7)', '(3*sqrt(2)*cos(2*pi/7)+cos(4*pi/7))/3'],
    ['cos(2pi/7)*cos(4pi/7)', '(cos(2*pi/7)+cos(6*pi/7))/2'],
    ['(1 + cbrt(2))^3', '3+3*cbrt(2)+3*cbrt(4)'],
    ['cbrt(4)*cbrt(6)', '2*cbrt(3)'],
    ['1/cbrt(2)', 'cbrt(4)/2'],
    ['1/(1 + cbrt(2))', '1/(1+cbrt(2))'],
    ['tan(2pi/7)', 'tan(2*pi/7)'],
    ['1/tan(pi/9)', 'cot(pi/9)'],
    ['(-1)^(1/7)', 'cos(pi/7)+i*sin(pi/7)'],
    ['(-2)^(2/3)', '(-1+i*sqrt(3))*cbrt(4)/2'],
    ['(1+i)^(2/5)', '(1+i)^(2/5)'],
    ['cbrt(cos(pi/7) - 2)', '-cbrt(2-cos(pi/7))'],
    ['sqrt(cos(2pi/7))^3', 'sqrt(cos(2*pi/7))*cos(2*pi/7)'],
    ['sqrt(2)*root(x^5-x-1, 1)', 'sqrt(2)*root(x^5-x-1, 1.16)'],
    ['re((-1)^(1/7))', 'cos(pi/7)'],
  ])('%s', (source, text) => {
    expect(written(source).text).toBe(text);
  });

  it('in TeX likewise', () => {
    expect(written('50*sqrt(61) - 900*sin(pi/7)').tex).toBe('50\\sqrt{61}-900\\sin\\frac{\\pi}{7}');
    expect(written('1/(1 + cbrt(2))').tex).toBe('\\frac{1}{1+\\sqrt[3]{2}}');
    expect(written('(sqrt(2)+1)*cbrt(2)').tex).toBe('\\left(1+\\sqrt{2}\\right)\\sqrt[3]{2}');
  });

  it('without regard to the order of the terms', () => {
    expect(written('cbrt(2) + cos(2pi/7) + 1')).toEqual(written('1 + cos(2pi/7) + cbrt(2)'));
  });

  it('and as a root of their polynomial where that is shorter', () => {
    const sum = Array.from({ length: 7 }, (_, k) => `root(x^3-x-1,1)^${k + 1}`).join('+');
    expect(written(`sqrt(${sum})`).text.length).toBeLessThan(220);
  });
});
