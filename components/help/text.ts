/** What the help page says, as data: the page only sets it. Functions and units come from the language. */
export const EXAMPLES = [
  {
    name: 'R = 1200 mm',
    meaning: 'Gives a length the mark R. Order on the sheet does not matter.',
  },
  {
    name: 's = 2 R sin(turn/34)',
    meaning: 'A side of a regular seventeen-sided figure, from the mark R.',
  },
  { name: 'sqrt(5 + 2 sqrt(6))', meaning: 'A value without a mark. √(5+2√6) is read too.' },
  {
    name: 's^2 == 2 R^2 (1 - cos(turn/17))',
    meaning: 'A statement. It is decided exactly, never by decimals.',
  },
  { name: 'a < b', meaning: 'Order is decided exactly as well; so are <=, >, >= and !=.' },
  {
    name: 'P = meet(circle(A, R), line(A, B), 2)',
    meaning: 'A point, from marks of other points and a length. Its x and y have cut sizes.',
  },
  { name: '# from drawing 14', meaning: 'A remark: whatever follows # is not read.' },
] as const;

export const RULES = [
  'Sums, differences, products, quotients and square roots of whole numbers, fractions and exact decimals: 0.1 is one tenth.',
  'A number before a name or a bracket multiplies: 2R, 3 sqrt(2). × ÷ · − π ° ² ³ √ are read as typed.',
  'Multiplying and dividing go from left to right, so 1/2 R is half of R. Brackets say otherwise.',
  'Units are checked: a length plus an angle is an error that says so. The root of an area is a length.',
  'A name is defined once on a sheet. Names of units and functions cannot be marks.',
  'A plain number as an angle is in radians; write turn/17, 15 deg or 15°.',
  'Points, lines and circles: x runs to the right and y upwards, angles anticlockwise from the x-axis. A coordinate 0 needs no unit. Points are added and scaled as vectors.',
] as const;

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
