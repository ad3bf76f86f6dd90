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
    fc
      .constantFrom(...FUNCTIONS)
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
    atom: fc.oneof({ maxDepth: 3 }, number, named),
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

export const statements: fc.Arbitrary<string> = fc.oneof(
  sources,
  fc
    .tuple(fc.constantFrom('R', 'x_2', 'β'), sources)
    .map(([mark, source]) => `${mark} = ${source}`),
  fc
    .tuple(sources, fc.constantFrom('==', '!=', '<', '≤', '>=', '>'), sources)
    .map((parts) => parts.join(' ')),
);

/** Exact plain numbers as sources: rationals and sums with small square roots. */
export const values: fc.Arbitrary<string> = fc
  .tuple(
    fc.integer({ min: -20, max: 20 }),
    fc.integer({ min: 1, max: 9 }),
    fc.integer({ min: -5, max: 5 }),
    fc.constantFrom(2, 3, 5, 6),
  )
  .map(([n, d, k, radicand]) => `(${n}/${d} + ${k} sqrt(${radicand}))`);

export const lengthUnits = fc.constantFrom(
  ...UNITS.filter(({ of }) => of === 'length').map(({ name }) => name),
);
