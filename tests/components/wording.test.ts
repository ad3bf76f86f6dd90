import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { copyForms } from '@/components/sheet/copy-forms';
import { reachCompartments, sayGuarantee } from '@/components/sheet/proof/say-proof';
import { sayDecimal, shorten } from '@/components/sheet/say-number';
import { polynomialTex, stackLeft } from '@/components/sheet/value-tex';
import {
  compartmentsOf,
  sayBriefly,
  sayDimension,
  sayResult,
  shortenUp,
} from '@/components/sheet/wording';
import { DECIDED, errorResult, numberResult, SUM_OF_ROOTS } from './sample-results';

const labels = (result: Parameters<typeof compartmentsOf>[0], full = false) =>
  compartmentsOf(result, full).map(({ label }) => label);

describe('a shortened bound', () => {
  it('never falls below the bound it shortens', () => {
    expect(shortenUp('0.0171185895305', 4)).toBe('0.01712');
    expect(shortenUp('9.99999', 3)).toBe('10.00');
    expect(shortenUp('0.25', 4)).toBe('0.25');
    expect(shortenUp('1.2345e-9', 3)).toBe('1.2345e-9');
  });
});

describe('values beyond straightedge and compass', () => {
  it('say so, and say what is not decided', () => {
    const reach = (straightedgeAndCompass: boolean | null, withTrisector: boolean | null) =>
      compartmentsOf(
        numberResult({ reach: { straightedgeAndCompass, withTrisector, reason: 'Because.' } }),
        false,
      ).find(({ label }) => label === 'Reach');
    expect(reach(false, true)).toMatchObject({
      value: 'not with straightedge and compass; with an angle trisector, yes',
      tone: 'approximate',
    });
    expect(reach(null, null)).toMatchObject({ value: 'not decided', tone: 'approximate' });
  });

  it('show a stand-in with its error and warn where stepping it round goes wrong', () => {
    const bounds = { low: '0', high: '1' };
    const items = compartmentsOf(
      numberResult({
        standIn: {
          of: 'chord(450 mm, turn/7)',
          tolerance: '0.2 mm',
          text: 'sqrt((300 mm)^2+(250 mm)^2)',
          family: 'hypotenuse',
          how: 'A right triangle.',
          source: null,
          error: { bound: '0.0171185895305', direction: 'above' },
          strikes: { total: 61, counts: '' },
          stepped: {
            kind: 'ring',
            parts: 7,
            inside: false,
            gap: bounds,
            miss: bounds,
            last: bounds,
            worst: bounds,
          },
          covered: [],
          others: [],
        },
      }),
      false,
    );
    expect(items.find(({ label }) => label === 'Error')?.value).toMatch(
      /^within 0\.01712.* above$/,
    );
    expect(items.find(({ label }) => label === 'Ring of 7')).toMatchObject({
      tone: 'approximate',
    });
  });
});

describe('a shortened decimal', () => {
  it('is a beginning of the decimal, never a rounding, and says that it was cut', () => {
    expect(shorten('3.14626436994197234232913506571')).toBe('3.1462643699419…');
    expect(shorten('0.000123456789012345678', 5)).toBe('0.00012345…');
    expect(shorten('999.9999999', 4)).toBe('999.9…');
  });

  it('leaves short ones, whole ones and the exponent alone', () => {
    for (const text of ['0', '500', '-0.75', '12345678901234567890'])
      expect(shorten(text)).toBe(text);
    expect(shorten('1.2345678901234567890e-40')).toBe('1.2345678901234…e-40');
  });

  it('keeps every figure before the point, whatever the number', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 0n, max: 10n ** 30n }),
        fc.bigInt({ min: 10n ** 20n, max: 10n ** 25n }),
        (whole, part) => {
          const cut = shorten(`${whole}.${part}`);
          expect(cut.startsWith(`${whole}`)).toBe(true);
          expect(`${whole}.${part}`.startsWith(cut.replace('…', ''))).toBe(true);
        },
      ),
    );
  });
});

describe('the compartments', () => {
  it('say decimal, degree, reach and tower of √2 + √3', () => {
    const items = compartmentsOf(SUM_OF_ROOTS, false);
    expect(items.map(({ label, value }) => [label, value])).toEqual([
      ['Decimal', '3.1462643699419…'],
      ['Degree', '4'],
      ['Reach', 'straightedge and compass'],
      ['Tower', '2 roots'],
    ]);
    expect(items.find(({ label }) => label === 'Reach')?.tone).toBe('reached');
  });

  it('spend the room on every figure when the cell is in hand', () => {
    expect(compartmentsOf(SUM_OF_ROOTS, true)[0]?.value).toBe('3.14626436994197234232913506571');
  });

  it('say in words what is not reached, and why when there is room', () => {
    const seven = numberResult({
      unit: null,
      degree: 3,
      tower: null,
      reach: {
        straightedgeAndCompass: false,
        withTrisector: true,
        reason: 'Degree 3 is no power of two.',
      },
    });
    const reach = compartmentsOf(seven, true).find(({ label }) => label === 'Reach');
    expect(reach?.tone).toBe('approximate');
    expect(reach?.value).toBe('not with straightedge and compass; with an angle trisector, yes');
    expect(labels(seven, true)).toContain('Because');
    expect(labels(seven, false)).not.toContain('Because');
  });

  it('do not call a degree transcendental that only went over a limit', () => {
    const pi = numberResult({ degree: null, tower: null, minimalPolynomial: null });
    expect(compartmentsOf(pi, false).find(({ label }) => label === 'Degree')?.value).toBe(
      'none: transcendental',
    );
    const over = {
      ...pi,
      omitted: [{ field: 'degree', code: 'limit-tower', message: 'Too high.' } as const],
    };
    expect(compartmentsOf(over, false).find(({ label }) => label === 'Degree')?.value).toBe(
      'over the limit',
    );
    expect(compartmentsOf(over, true).at(-1)).toMatchObject({
      label: 'Left out',
      value: 'Too high.',
    });
  });

  it('write a value that is not real with both its parts, and say that it is not', () => {
    const result = numberResult({
      real: false,
      unit: null,
      decimal: { re: '0.5', im: '-0.25', digits: 30, terminates: true },
    });
    expect(sayDecimal(result, false)).toBe('0.5 − 0.25 i');
    expect(labels(result)).toContain('Kind');
  });

  it('say of a statement that it is false, not only by colour', () => {
    expect(compartmentsOf(DECIDED, false)[0]).toMatchObject({
      value: 'false, exactly',
      tone: 'fault',
    });
  });
});

describe('the drawn dimension', () => {
  it('carries the cut size and the way it was rounded', () => {
    const cut = {
      value: '551.0',
      step: '0.5 mm',
      rounding: 'half-even',
      direction: 'down',
    } as const;
    expect(sayDimension(numberResult({ cut }))).toEqual({
      figure: '551.0 mm',
      below: 'rounded down to 0.5 mm',
    });
    expect(sayDimension(numberResult({ cut: { ...cut, direction: 'exact' } }))?.below).toBe(
      'exact',
    );
  });

  it('never passes a shortened figure off as exact', () => {
    const long = numberResult({
      decimal: { re: '551.2485534496', im: null, digits: 13, terminates: true },
    });
    expect(sayDimension(long)).toEqual({
      figure: '551.2485… mm',
      below: 'not rounded: no cutting step',
    });
    expect(sayDimension(numberResult())?.below).toBe('exact');
  });

  it('is drawn for real lengths only', () => {
    expect(sayDimension(SUM_OF_ROOTS)).toBeNull();
    expect(sayDimension(numberResult({ unit: 'mm^2' }))).toBeNull();
    expect(sayDimension(numberResult({ real: false }))).toBeNull();
    expect(sayDimension(DECIDED)).toBeNull();
  });
});

describe('a result in words', () => {
  it('names the mark, the size, the degree and the reach', () => {
    expect(sayResult(numberResult())).toBe(
      'R is 500 mm, degree 1, reached with straightedge and compass.',
    );
    expect(sayResult(errorResult(1, 'R = (', 5, 5))).toContain(
      'A closing bracket was expected here.',
    );
  });

  it('is brief in the index of marks', () => {
    expect(sayBriefly(numberResult())).toBe('500 mm');
    expect(sayBriefly(numberResult({ unit: 'mm^2' }))).toBe('500 mm²');
    expect(sayBriefly(DECIDED)).toBe('false');
    expect(sayBriefly(errorResult(1, 'R', 0, 1))).toBe('error');
  });

  it('leaves the sheet as exact text, TeX, MathML, decimal, cut size and JSON, whole', async () => {
    const forms = new Map(copyForms(SUM_OF_ROOTS).map(({ label, text }) => [label, text]));
    expect([...forms.keys()]).toEqual(['Exact text', 'TeX', 'MathML', 'Decimal', 'JSON']);
    expect(forms.get('Exact text')).toBe('sqrt(2)+sqrt(3)');
    expect(forms.get('TeX')).toBe('\\sqrt{2}+\\sqrt{3}');
    expect(forms.get('Decimal')).toBe('3.14626436994197234232913506571');
    expect(JSON.parse(String(forms.get('JSON')))).toEqual(SUM_OF_ROOTS);
    const mathMl = forms.get('MathML');
    const written = typeof mathMl === 'function' ? await mathMl() : '';
    expect(written).toMatch(/^<math [^>]*Math\/MathML/);
    expect(written.match(/<msqrt>/g)).toHaveLength(2);
    expect(written).toMatch(/<\/math>$/);
    expect(copyForms(errorResult(1, 'R', 0, 1))).toEqual([]);
    expect(copyForms(DECIDED).map(({ label }) => label)).toEqual(['JSON']);
  });
});

describe('the guarantee of a cut size', () => {
  const cut = { value: '551', step: '0.5 mm' } as const;

  it('says on which side the size lies and by how much at most', () => {
    expect(sayGuarantee({ ...cut, rounding: 'half-even', direction: 'down' })).toBe(
      'Rounded down: the cut size is smaller than the exact value, by at most half a step of 0.5 mm.',
    );
    expect(sayGuarantee({ ...cut, rounding: 'up', direction: 'up' })).toBe(
      'Rounded up: the cut size is larger than the exact value, by less than a step of 0.5 mm.',
    );
    expect(sayGuarantee({ ...cut, rounding: 'up', direction: 'exact' })).toContain('whole number');
  });
});

describe('the verdict tool by tool', () => {
  it('counts the straightedge and compass among the tools beside the trisector', () => {
    const say = (straightedgeAndCompass: boolean | null, withTrisector: boolean | null) =>
      reachCompartments({ straightedgeAndCompass, withTrisector }).map(({ value }) => value);
    expect(say(true, null)).toEqual(['reach it', 'reach it']);
    expect(say(false, true)).toEqual(['do not reach it', 'reach it']);
    expect(say(false, false)).toEqual(['do not reach it', 'do not reach it']);
    expect(say(null, null)).toEqual(['not decided', 'not decided']);
  });
});

describe('a polynomial', () => {
  it.each([
    [['1', '0', '-10', '0', '1'], 'x^{4}-10x^{2}+1'],
    [['8', '4', '-4', '-1'], '8x^{3}+4x^{2}-4x-1'],
    [['1', '-5'], 'x-5'],
    [['-1', '0'], '-x'],
  ])('of coefficients %j is written %s', (coefficients, tex) => {
    expect(polynomialTex(coefficients)).toBe(tex);
  });
});

describe('a stack of lines', () => {
  it('begins at the margin, and what is no stack stays as it is', () => {
    expect(stackLeft('\\begin{gathered}a=1\\\\b=2\\end{gathered}')).toBe(
      '\\begin{aligned}&a=1\\\\&b=2\\end{aligned}',
    );
    expect(stackLeft('\\sqrt{2}')).toBe('\\sqrt{2}');
  });
});
