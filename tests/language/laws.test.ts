import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, it } from 'vitest';
import { type Result, evaluateCells, evaluateExpression } from '@/lib/language/index';
import { printStatement } from '@/lib/language/print';
import { readLine } from '@/lib/language/read';
import { typesetStatement } from '@/lib/language/typeset';
import { lengthUnits, sources, statements, values } from './arbitraries';
import { shapeOf } from './shape';

function statementOf(source: string) {
  const reading = readLine(source);
  if (reading.kind !== 'statement')
    throw new Error(`${source} was read as ${JSON.stringify(reading)}.`);
  return reading.statement;
}

function holds(source: string): boolean {
  const result = evaluateExpression(source, { digits: 5 });
  if (result.kind !== 'truth') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result.truth.value;
}

describe('print and read', () => {
  it('what is printed is read as the same tree', () => {
    fc.assert(
      fc.property(statements, (source) => {
        const statement = statementOf(source);
        // Products by standing side by side are printed with a sign.
        const shape = shapeOf(statement).replaceAll(' . ', ' * ');
        expect(shapeOf(statementOf(printStatement(statement)))).toBe(shape);
      }),
    );
  });

  it('what has been printed is printed the same again', () => {
    fc.assert(
      fc.property(statements, (source) => {
        const printed = printStatement(statementOf(source));
        expect(printStatement(statementOf(printed))).toBe(printed);
      }),
    );
  });

  it('every tree is typeset in TeX that the screen accepts', () => {
    fc.assert(
      fc.property(statements, (source) => {
        const tex = typesetStatement(statementOf(source));
        expect(() =>
          katex.renderToString(tex, { throwOnError: true, strict: 'ignore' }),
        ).not.toThrow();
      }),
    );
  });

  it('no line that parses makes the evaluation throw, and places lie within the line', () => {
    fc.assert(
      fc.property(sources, (source) => {
        const result = evaluateExpression(source, { digits: 3, step: '1 mm' });
        if (result.kind === 'error') {
          expect(
            0 <= result.error.from &&
              result.error.from < result.error.to &&
              result.error.to <= source.length,
          ).toBe(true);
        }
      }),
    );
  });

  it('no text at all makes the reading throw', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const [cell] = evaluateCells([{ id: 'a', source: text }], { digits: 3 });
        for (const result of cell?.results ?? [])
          if (result.kind === 'error') expect(result.error.message).toMatch(/[.?]$/);
      }),
    );
  });
});

describe('exact text', () => {
  it('parses back to the same value', () => {
    fc.assert(
      fc.property(fc.array(values, { minLength: 1, maxLength: 3 }), (parts) => {
        const source = parts.join(' * ');
        const result = evaluateExpression(source, { digits: 5 });
        if (result.kind !== 'number') throw new Error(JSON.stringify(result));
        expect(holds(`${source} == ${result.exact.text}`)).toBe(true);
      }),
    );
  });

  it('parses back to the same angle', () => {
    fc.assert(
      fc.property(fc.integer({ min: -500, max: 500 }), fc.integer({ min: 1, max: 500 }), (n, d) => {
        const result: Result = evaluateExpression(`${n}/${d} * turn`);
        if (result.kind !== 'angle') throw new Error(JSON.stringify(result));
        expect(holds(`${result.exact.text} == ${n}/${d} * turn`)).toBe(true);
      }),
    );
  });
});

describe('units', () => {
  it('conversion is exact both ways', () => {
    fc.assert(
      fc.property(values, lengthUnits, lengthUnits, (value, a, b) => {
        expect(holds(`${value} ${a} == (${value} ${a} / ${b}) * ${b}`)).toBe(true);
      }),
    );
  });

  it('a product has the sum of the exponents and a root half of them', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -4, max: 4 }),
        fc.integer({ min: -4, max: 4 }),
        lengthUnits,
        (p, q, unit) => {
          const product = evaluateExpression(`${unit}^${p} * ${unit}^${q}`);
          const expected = p + q === 0 ? null : p + q === 1 ? 'mm' : `mm^${p + q}`;
          expect(product.kind === 'number' && product.unit).toBe(expected);
          expect(holds(`sqrt((${unit}^${p})^2) == ${unit}^${p}`)).toBe(true);
        },
      ),
    );
  });

  it('a value does not depend on the unit in which results are given', () => {
    fc.assert(
      fc.property(
        values,
        lengthUnits,
        fc.constantFrom('mm', 'cm', 'm', 'in', 'ft'),
        (value, unit, given) => {
          const result = evaluateExpression(`${value} ${unit}`, { unit: given, digits: 5 });
          if (result.kind !== 'number') throw new Error(JSON.stringify(result));
          expect(result.unit).toBe(given);
          expect(holds(`(${result.exact.text}) ${given} == ${value} ${unit}`)).toBe(true);
        },
      ),
    );
  });

  it('a sum of unlike kinds is refused whatever the values', () => {
    fc.assert(
      fc.property(
        values,
        values,
        fc.constantFrom(['mm', 'deg'], ['mm', 'mm^2'], ['', 'mm'], ['deg', '']),
        (a, b, [left = '', right = '']) => {
          const result = evaluateExpression(`(${a} ${left}) + (${b} ${right})`);
          expect(result.kind === 'error' && result.error.code).toBe('unit-mismatch');
        },
      ),
    );
  });

  it('the cut size lies on the stated side and within a step', () => {
    fc.assert(
      fc.property(
        values,
        fc.constantFrom('0.5 mm', '1/64 in', '5 mm'),
        fc.constantFrom('half-even', 'half-up', 'up', 'down'),
        fc.constantFrom('mm', 'in'),
        (value, step, rounding, unit) => {
          const result = evaluateExpression(`${value} mm`, { unit, step, rounding, digits: 40 });
          if (result.kind !== 'number' || result.cut === undefined)
            throw new Error(JSON.stringify(result));
          const { cut } = result;
          const distance = rounding === 'up' || rounding === 'down' ? step : `(${step})/2`;
          // The decimal of a step that does not end in this unit is rounded itself.
          const slack = `10^-30 ${unit}`;
          expect(holds(`abs((${cut.value}) ${unit} - ${value} mm) <= ${distance} + ${slack}`)).toBe(
            true,
          );
          const relation = { up: '>', down: '<', exact: '==' }[cut.direction];
          if (cut.direction !== 'exact')
            expect(holds(`(${cut.value}) ${unit} ${relation} ${value} mm`)).toBe(true);
        },
      ),
    );
  });
});

describe('order on the page', () => {
  it('does not matter: shuffled cells give the same values', () => {
    const lines = ['a = 2', 'b = a^2 + 1', 'c = sqrt(b)', 'd = c + a', 'f = a b c d'];
    const exact = (cells: string[]) =>
      new Map(
        evaluateCells(cells.map((source, index) => ({ id: String(index), source })))
          .flatMap(({ results }) => results)
          .map((result): [string | null, string] => [
            result.mark,
            result.kind === 'number' ? result.exact.text : result.kind,
          ]),
      );
    const expected = exact(lines);
    fc.assert(
      fc.property(fc.shuffledSubarray(lines, { minLength: lines.length }), (shuffled) => {
        expect(exact(shuffled)).toEqual(expected);
      }),
    );
  });
});
