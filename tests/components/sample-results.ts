import type { Result } from '@/components/sheet/result';

type NumberResult = Extract<Result, { kind: 'number' }>;

const REACHED = {
  straightedgeAndCompass: true,
  withTrisector: true,
  reason: 'A tower of square roots.',
};

/** A result as the evaluation gives it; whatever a test does not speak of is 500 mm. */
export function numberResult(given: Partial<NumberResult> = {}): NumberResult {
  return {
    kind: 'number',
    line: 1,
    source: 'R = 500 mm',
    mark: 'R',
    typeset: 'R=500\\,\\mathrm{mm}',
    notices: [],
    exact: { text: '500', tex: '500', staged: false },
    unit: 'mm',
    real: true,
    decimal: { re: '500', im: null, digits: 30, terminates: true },
    degree: 1,
    minimalPolynomial: ['1', '-500'],
    tower: [],
    reach: REACHED,
    ...given,
  };
}

/** √2 + √3: degree 4, DLMF-like decimals computed to 30 places. */
export const SUM_OF_ROOTS = numberResult({
  source: 'sqrt(5+2*sqrt(6))',
  mark: null,
  typeset: '\\sqrt{5+2\\sqrt{6}}',
  exact: { text: 'sqrt(2)+sqrt(3)', tex: '\\sqrt{2}+\\sqrt{3}', staged: false },
  unit: null,
  decimal: { re: '3.14626436994197234232913506571', im: null, digits: 30, terminates: false },
  degree: 4,
  minimalPolynomial: ['1', '0', '-10', '0', '1'],
  tower: [
    { name: 'r1', radicand: '2', tex: '2' },
    { name: 'r2', radicand: '3', tex: '3' },
  ],
});

export function errorResult(line: number, source: string, from: number, to: number): Result {
  return {
    kind: 'error',
    line,
    source,
    mark: null,
    typeset: null,
    error: { code: 'syntax', message: 'A closing bracket was expected here.', from, to },
  };
}

export const DECIDED: Result = {
  kind: 'truth',
  line: 1,
  source: 's == R',
  mark: null,
  typeset: 's=R',
  notices: [],
  truth: { value: false, reason: 'Their difference is 1 mm.' },
};
