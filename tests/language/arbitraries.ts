import fc from 'fast-check';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';

/** Sources of the language with every form in them, each bracketed at random, that parse but need not have a value. */
export const sources: fc.Arbitrary<string> = fc.letrec<{
  sum: string;
  product: string;
  power: string;
  atom: string;
}>((tie) => {
  const number = fc.constantFrom('0', '1', '2', '10', '0.5', '.25', '3.');
  const unit = fc.constantFrom(...UNITS.map(({ name }) => name), '°');
  const named = fc.oneof(
    fc.constantFrom('a', 'R_1', 'alpha', 'x'),
    fc.constantFrom(...CONSTANTS.map(({ name }) => name), 'π'),
    unit,
    tie('sum').map((inner) => `(${inner})`),
    tie('atom').map((inner) => `√${inner}`),
    tie('sum').map((inner) => `L[${inner}]`),
    fc.tuple(tie('sum'), tie('sum')).map((args) => `g(${args.join(', ')})`),
    fc
      .tuple(fc.constantFrom('k', 'n_1'), tie('sum'), tie('sum'), tie('sum'))
      .map((args) => `each(${args.join(', ')})`),
    fc
      .constantFrom(...FUNCTIONS.filter(({ name }) => name !== 'each'))
      .chain(({ name, least }) =>
        fc
          .array(tie('sum'), { minLength: least, maxLength: least })
          .map((args) => `${name}(${args.join(', ')})`),
      ),
  );
  const quantity = fc
    .tuple(number, unit, fc.constantFrom('', '^2', '²', '^-1'))
    .map((parts) => `${parts[0]} ${parts[1]}${parts[2]}`);
  return {
    atom: fc.oneof(
      { maxDepth: 3 },
      number,
      named,
      fc.array(tie('sum'), { minLength: 1, maxLength: 3 }).map((items) => `[${items.join(', ')}]`),
      fc.tuple(tie('sum'), tie('sum')).map(([item, index]) => `[${item}][${index}]`),
    ),
    power: fc.oneof(
      { maxDepth: 3 },
      tie('atom'),
      quantity,
      fc
        .tuple(tie('atom'), fc.constantFrom('^2', '^-1', '²', '³', '^(1/2)', '^a^b'))
        .map((parts) => parts.join('')),
    ),
    product: fc.oneof(
      { maxDepth: 3 },
      tie('power'),
      fc
        .tuple(tie('power'), fc.constantFrom('*', ' / ', '×', '*-', ' ÷ '), tie('power'))
        .map((parts) => parts.join('')),
      fc.tuple(tie('power'), named).map((parts) => parts.join(' ')),
      fc.constantFrom('1/2 mm', '3/4 in', 'a/2 mm', '2*3/4 ft', '6/3/4 in'),
      fc.constantFrom('3 1/2 in', '2 1/4 ft²', '5 ft 3 1/2 in', '6/5 ft 3/4 in', '2*5 ft 3.5 in'),
      fc.constantFrom('51° 30′ 15.5″', 'a/51 deg 30\' 7"', '0 deg 15 sec', '9° 1 min 2 sec b'),
    ),
    sum: fc.oneof(
      { maxDepth: 3 },
      tie('product'),
      fc
        .tuple(
          fc.constantFrom('', '-', '+'),
          tie('product'),
          fc.constantFrom(' + ', '-', ' − ', '--'),
          tie('product'),
        )
        .map((parts) => parts.join('')),
    ),
  };
}).sum;

const plainStatements: fc.Arbitrary<string> = fc.oneof(
  sources,
  fc
    .tuple(fc.constantFrom('R', 'x_2', 'β'), sources)
    .map(([mark, source]) => `${mark} = ${source}`),
  fc
    .tuple(sources, fc.constantFrom('==', '!=', '<', '≤', '>=', '>'), sources)
    .map((parts) => parts.join(' ')),
);

/** Statements of every kind, with local names or without. */
export const statements: fc.Arbitrary<string> = fc
  .tuple(
    fc.oneof(
      { weight: 4, arbitrary: plainStatements },
      {
        weight: 1,
        arbitrary: fc
          .tuple(fc.constantFrom('f(x)', 'rise(span, R_1)', 'β(a, b, c)'), sources)
          .map(([head, source]) => `${head} = ${source}`),
      },
    ),
    fc.oneof(
      { weight: 4, arbitrary: fc.constant('') },
      { weight: 1, arbitrary: sources.map((source) => ` where r = ${source}`) },
      {
        weight: 1,
        arbitrary: fc.tuple(sources, sources).map(([r, s]) => ` where r = ${r}, s_1 = ${s}`),
      },
    ),
  )
  .map((parts) => parts.join(''));

/** Exact plain numbers as sources: rationals and sums with small square roots. */
export const values: fc.Arbitrary<string> = fc
  .tuple(
    fc.integer({ min: -20, max: 20 }),
    fc.integer({ min: 1, max: 9 }),
    fc.integer({ min: -5, max: 5 }),
    fc.constantFrom(2, 3, 5, 6),
  )
  .map(([n, d, k, radicand]) => `(${n}/${d} + ${k} sqrt(${radicand}))`);

/** Exact plain numbers of one small field, for laws that put many of them together. */
export const fewValues: fc.Arbitrary<string> = fc
  .tuple(
    fc.integer({ min: -9, max: 9 }),
    fc.integer({ min: 1, max: 4 }),
    fc.integer({ min: -3, max: 3 }),
  )
  .map(([n, d, k]) => `(${n}/${d} + ${k} sqrt(2))`);

export const lengthUnits = fc.constantFrom(
  ...UNITS.filter(({ of }) => of === 'length').map(({ name }) => name),
);
