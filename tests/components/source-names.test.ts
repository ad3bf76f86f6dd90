import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { callAt, parameterOf, parametersOf } from '@/components/sheet/editor/call-at';
import { findDefinition, knownMarks, markDefinedBy } from '@/components/sheet/editor/names';
import { findFacts, findSignature, sayFacts, wordAt } from '@/components/sheet/editor/word-at';
import { drawWordCard } from '@/components/sheet/editor/word-card';
import { foldAnswer } from '@/components/sheet/state/shown';
import { FUNCTIONS } from '@/lib/language/names';
import { dimension, note } from './sample';
import { errorResult, numberResult } from './sample-results';

const isFunction = (name: string) => FUNCTIONS.some((one) => one.name === name);

/** A line with a bar where the cursor stands. */
function call(marked: string) {
  const cursor = marked.indexOf('|');
  const found = callAt(marked.replace('|', ''), cursor, isFunction);
  return found && [found.name, found.argument];
}

describe('the call around the cursor', () => {
  it.each([
    ['chord(|', ['chord', 0]],
    ['s = chord(R|', ['chord', 0]],
    ['s = chord(R, |', ['chord', 1]],
    ['s = chord(R, turn/8|)', ['chord', 1]],
    ['chord(sqrt(2|), 1)', ['sqrt', 0]],
    ['chord(sqrt(2)|, 1)', ['chord', 0]],
    ['chord((R + (1 - 2|', ['chord', 0]],
    ['chord((1, 2), |', ['chord', 1]],
    ['min([1, 2, 3], |', ['min', 1]],
    ['chord (R, |', ['chord', 1]],
  ])('of %s', (line, expected) => {
    expect(call(line)).toEqual(expected);
  });

  it.each(['|chord(R)', 'chord(R)|', '2 (R|)', 'R(2|)', '1 # chord(R, |', '(a, b|'])(
    'is none in %s',
    (line) => {
      expect(call(line)).toBeNull();
    },
  );

  it('is the same wherever in an argument the cursor stands, for any brackets before it', () => {
    const argument = fc.constantFrom('1', 'sqrt(2)', '(R + 1)', 'min(1, 2)', '[1, 2]');
    fc.assert(
      fc.property(fc.array(argument, { minLength: 1, maxLength: 4 }), (args) => {
        const found = callAt(`max(${args.join(', ')}`, `max(${args.join(', ')}`.length, isFunction);
        expect(found).toEqual({ name: 'max', from: 0, argument: args.length - 1 });
      }),
    );
  });

  it('has a parameter in hand for every argument a function needs', () => {
    for (const { signature, least, most } of FUNCTIONS) {
      const parameters = parametersOf(signature);
      for (let argument = 0; argument < (most ?? least + 5); argument += 1) {
        if (most !== null && argument >= least) break;
        expect(parameterOf(parameters, argument), `${signature} ${argument}`).not.toBeNull();
      }
      if (most !== null) expect(parameterOf(parameters, most), signature).toBeNull();
    }
  });

  it('keeps a list that is one parameter together', () => {
    expect(parametersOf('sum([a, b], n)')).toEqual(['[a, b]', 'n']);
    expect(parametersOf('nothing()')).toEqual([]);
  });
});

describe('the name at a place', () => {
  it.each([
    ['2R sin(turn/34)', 1, 'R'],
    ['2R sin(turn/34)', 2, 'R'],
    ['2R sin(turn/34)', 3, 'sin'],
    ['15°', 2, 'deg'],
    ['√2', 0, 'sqrt'],
    ['πR_1', 1, 'pi'],
    ['πR_1', 3, 'R_1'],
  ])('of %s at %i is %s', (line, offset, name) => {
    expect(wordAt(line, offset)?.name).toBe(name);
  });

  it.each([
    ['1 + 2', 2],
    ['R # the radius', 9],
    ['', 0],
  ])('%j has none at %i', (line, offset) => {
    expect(wordAt(line, offset)).toBeNull();
  });
});

describe('what is known of a name', () => {
  const cells = [dimension('a', 'R = 500 mm'), note('n', 'text'), dimension('b', 'x =\ny = (R')];
  const shown = foldAnswer(new Map(), [
    {
      id: 'a',
      results: [
        numberResult({
          cut: { value: '500', step: '0.5 mm', rounding: 'half-even', direction: 'exact' },
        }),
      ],
    },
    { id: 'b', results: [{ ...errorResult(2, 'y = (R', 6, 6), mark: 'y' }] },
  ]);
  const marks = knownMarks(cells, shown);

  it('names its line as the sheet counts cells, notes among them', () => {
    expect(marks.map(({ name, where }) => [name, where])).toEqual([
      ['R', 'cell 1, line 1'],
      ['y', 'cell 3, line 2'],
    ]);
  });

  it('is drawn with the value typeset, decimal and cut size', () => {
    const facts = findFacts('R', marks);
    if (!facts) throw new Error('R is known.');
    const card = drawWordCard(facts);
    expect(card.querySelector('math')).not.toBeNull();
    expect(card.textContent).toContain('Decimal500 mm');
    expect(card.textContent).toContain('Cut size500 mm, exact');
    expect(sayFacts(facts)).toBe('R, defined in cell 1, line 1: 500 mm, cut size 500 mm, exact');
  });

  it('is what is wrong, where a mark has no value', () => {
    const facts = findFacts('y', marks);
    if (!facts) throw new Error('y is known.');
    expect(drawWordCard(facts).querySelector('math')).toBeNull();
    expect(sayFacts(facts)).toContain('A closing bracket was expected here.');
  });

  it('is the signature of a function of the notebook, as it is called', () => {
    const made = knownMarks(
      [{ id: 'f' }],
      foldAnswer(new Map(), [
        {
          id: 'f',
          results: [
            {
              kind: 'function',
              line: 1,
              source: 'half(x) = x/2',
              mark: 'half',
              typeset: '\\mathrm{half}(x)=\\frac{x}{2}',
              notices: [],
              signature: 'half(x)',
              parameters: ['x'],
              reads: [],
            },
          ],
        },
      ]),
    );
    expect(findSignature('half', made)).toBe('half(x)');
    expect(findSignature('chord', made)).toBe('chord(R, angle)');
    expect(findSignature('R', marks)).toBeNull();
    const facts = findFacts('half', made);
    if (!facts) throw new Error('half is known.');
    expect(sayFacts(facts)).toBe('half(x), defined in cell 1, line 1');
    expect(drawWordCard(facts).querySelector('math')).not.toBeNull();
  });

  it('is a signature and a meaning for every word of the language, and nothing for a stranger', () => {
    for (const { name, signature, meaning } of FUNCTIONS) {
      expect(findFacts(name, marks)).toMatchObject({ signature, meaning });
    }
    expect(findFacts('mm', marks)).toMatchObject({ sort: 'unit' });
    expect(findFacts('pi', marks)).toMatchObject({ sort: 'constant' });
    expect(findFacts('stranger', marks)).toBeNull();
  });
});

describe('the line that defines a name', () => {
  const cells = [
    note('n', 'R = 5'),
    dimension('a', 's = 2R\nR == 3\n  R = 1200 mm'),
    dimension('b', 'R_1 = (\nf(x, y) = x + y'),
  ];

  it.each([
    ['R', { id: 'a', line: 2, column: 2 }],
    ['R_1', { id: 'b', line: 0, column: 0 }],
    ['f', { id: 'b', line: 1, column: 0 }],
  ])('of %s', (name, place) => {
    expect(findDefinition(cells, name)).toEqual(place);
  });

  it.each(['x', 'R_', '', '(', '.*', '2R'])('of %j is none', (name) => {
    expect(findDefinition(cells, name)).toBeNull();
  });

  it('is told from its beginning', () => {
    expect(markDefinedBy('  R_1 = (')).toBe('R_1');
    expect(markDefinedBy('f(x, y) = x + y')).toBe('f');
    expect(markDefinedBy('R == 1')).toBeNull();
    expect(markDefinedBy('2R = 1')).toBeNull();
  });
});
