import type { FormWord } from '@/lib/language/names';

/** What the reference says beside the language's own words, as data: the page only sets it. */
export const MORE_FORMS: readonly FormWord[] = [
  {
    name: 'value',
    form: '(1 + sqrt(5))/2, 0.1',
    meaning:
      'Sums, differences, products, quotients and square roots of whole numbers, fractions and exact decimals: `0.1` is one tenth.',
    example: '(1 + sqrt(5))/2',
  },
  {
    name: 'signs',
    form: '× ÷ · − π ° ² ³ √',
    meaning:
      'Are read as typed; on a keyboard `*` `/` `-` `pi` `deg` `^2` `^3` `sqrt()` mean the same.',
    example: '√(5 + 2√6)',
  },
  {
    name: 'quantity',
    form: '1200 mm',
    meaning:
      'A number with a unit. Units are checked: a length plus an angle is an error that says so. The root of an area is a length.',
    example: 'sqrt((250 mm)^2 + (300 mm)^2)',
  },
  {
    name: 'angle',
    form: 'turn/17, 15 deg, 15°',
    meaning:
      'An angle is a part of a turn or a number of degrees; a plain number as an angle is in radians.',
    example: 'turn/24 == 15°',
  },
  {
    name: 'coordinates',
    form: 'point(x, y), A + B, 2 A',
    meaning:
      'Points, lines and circles: x runs to the right and y upwards, angles anticlockwise from the x-axis. A coordinate 0 needs no unit. Points are added and scaled as vectors, and have cut sizes.',
    example: 'A = point(0, 0)\nB = point(300 mm, 400 mm)\n(A + B)/2 == mid(A, B)',
  },
];

export const WORDS = [
  { name: 'mark', meaning: 'The name a line gives to a value: the letter on a drawing.' },
  {
    name: 'cut size',
    meaning: 'A length rounded to the cutting step of the sheet, with the way it was rounded.',
  },
  {
    name: 'reach',
    meaning:
      'Which tools reach a value exactly: straightedge and compass, those plus an angle trisector, or neither.',
  },
  {
    name: 'degree',
    meaning: 'The degree of the simplest equation with whole coefficients that the value solves.',
  },
  {
    name: 'tower',
    meaning: 'The chain of square roots that builds the value, each with what stands under it.',
  },
  {
    name: 'version',
    meaning: 'A kept state of the notebook. It never changes; the next one has the next number.',
  },
  {
    name: 'client link',
    meaning: 'An address that shows the newest version to read and export, without an account.',
  },
] as const;

export const CAUTIONS = [
  'Exact numbers do not make a structure safe. Stability, loads, fixings, glass and stairs belong to licensed designers and to the codes of the place.',
  'Lifting and handling are for trained people with the right tackle.',
  'Cutting stone makes silica dust: follow the law of the place on extraction and masks.',
  'Measure the opening before cutting, and cut and try one piece before a batch.',
] as const;
