import type { Compartment } from '@/components/drawing/compartments';
import type { Result } from './result';
import { DIRECTIONS } from './say-number';

type Inches = NonNullable<Extract<Result, { kind: 'number' }>['inches']>;
type Angle = Extract<Result, { kind: 'angle' }>;
type Direction = Inches['direction'];

const FRACTIONS: Record<string, [one: string, many: string]> = {
  '2': ['half', 'halves'],
  '4': ['quarter', 'quarters'],
  '8': ['eighth', 'eighths'],
  '16': ['sixteenth', 'sixteenths'],
  '32': ['thirty-second', 'thirty-seconds'],
  '64': ['sixty-fourth', 'sixty-fourths'],
};

function speakFraction(count: string, parts: string): string {
  const [one, many] = FRACTIONS[parts] ?? [`part in ${parts}`, `parts in ${parts}`];
  return `${count} ${count === '1' ? one : many}`;
}

/** `5 ft 7 7/8 in` in words: `5 feet 7 inches and 7 eighths`. */
export function speakInches(text: string): string {
  const match = /^(-?)(?:(\d+) ft)? ?(?:(\d+)? ?(?:(\d+)\/(\d+))? in)?$/.exec(text);
  if (match === null) return text;
  const [, sign, feet, whole, count, parts] = match;
  const fraction = count === undefined || parts === undefined ? null : speakFraction(count, parts);
  const said = [
    ...(sign === '-' ? ['minus'] : []),
    ...(feet === undefined ? [] : [`${feet} ${feet === '1' ? 'foot' : 'feet'}`]),
    ...(whole === undefined ? [] : [`${whole} ${whole === '1' ? 'inch' : 'inches'}`]),
  ];
  if (fraction !== null)
    said.push(whole === undefined ? `${fraction} of an inch` : `and ${fraction}`);
  return said.join(' ');
}

/** `51° 30′ 15.5″` in words; noughts are left out. */
export function speakDms(text: string): string {
  const match = /^(-?)(\d+)° (\d+)′ ([\d.]+)″$/.exec(text);
  if (match === null) return text;
  const [, sign, ...counts] = match;
  const units = ['degree', 'minute', 'second'];
  const said = counts.flatMap((count, at) =>
    count === '0' && counts.some((other) => other !== '0')
      ? []
      : [`${count} ${units[at] ?? ''}${count === '1' ? '' : 's'}`],
  );
  return (
    (sign === '-' ? 'minus ' : '') +
    (said.length === 3 && counts.every((count) => count === '0') ? '0 degrees' : said.join(', '))
  );
}

/** On which side of the exact value a rounded one lies. */
const SIDES: Record<Direction, string> = { up: 'above', down: 'below', exact: '' };

/** How far the length on the rule is from the exact one, and on which side: `0.184175 mm below the exact length`. */
export function sayInchesError({ error, direction }: Inches): string {
  if (direction === 'exact') return 'exactly';
  return `${error.replace(/^[+-]/, '')} mm ${SIDES[direction]} the exact length`;
}

/** A length as a rule in inches shows it, with what that leaves. */
export function inchesCompartments(inches: Inches | undefined, unit: string | null): Compartment[] {
  if (inches === undefined) return [];
  return [
    {
      label: unit === 'ft' ? 'Feet and inches' : 'Inches',
      value: inches.text,
      figures: true,
      spoken: speakInches(inches.text),
    },
    { label: `Nearest 1/${inches.denominator} in`, value: sayInchesError(inches) },
  ];
}

const WHOLE_DEGREES = /^-?\d+° 0′ 0″$/;

/** An angle in degrees, minutes and seconds, unless it is whole degrees and so has none; `full` then too. */
export function dmsCompartments({ text, direction }: Angle['dms'], full: boolean): Compartment[] {
  const isExact = direction === 'exact';
  if (isExact && WHOLE_DEGREES.test(text) && !full) return [];
  const rounded = isExact ? 'exact' : `${DIRECTIONS[direction]} to 0.1″`;
  return [
    {
      label: 'Degrees, minutes, seconds',
      value: `${text}, ${rounded}`,
      figures: true,
      spoken: `${speakDms(text)}, ${isExact ? 'exact' : `${DIRECTIONS[direction]} to a tenth of a second`}`,
    },
  ];
}

/** What rounding to the divisions of the rule leaves, in a sentence. */
export function sayGap(inches: Inches): string {
  const nearest = `the nearest 1/${inches.denominator} in`;
  return inches.direction === 'exact'
    ? `The length falls on a division of the rule, so ${nearest} is the length itself.`
    : `Rounded to ${nearest}: the length on the rule is ${sayInchesError(inches)}.`;
}
