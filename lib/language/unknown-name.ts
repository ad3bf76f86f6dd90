import type { Problem, Span } from './failure';
import type { SourceLine } from './lines';
import { findNearest } from './words';

/** Words for units that people write out or know by another name. */
const UNIT_WORDS: readonly (readonly [unit: string, words: string])[] = [
  ['mm', 'millimetre millimetres millimeter millimeters'],
  ['cm', 'centimetre centimetres centimeter centimeters'],
  ['m', 'metre metres meter meters'],
  ['in', 'inch inches'],
  ['ft', 'foot feet'],
  ['deg', 'degree degrees'],
  ['turn', 'turns rev'],
];

/**
 * What is said of a name that no line defines, with what was probably meant: a word of the language, a mark, a unit written out,
 * or a definition instead of a decision.
 */
export function explainUnknown(
  name: string,
  at: Span,
  use: 'mark' | 'function',
  marks: Iterable<string>,
  line: SourceLine | undefined,
): Problem {
  const none =
    use === 'mark' ? `No mark \`${name}\` is defined` : `There is no function \`${name}\``;
  const hint = hintOf(name, at, marks, line);
  const message = `${none}${hint}${hint.endsWith('?') ? '' : '.'}`;
  return { code: 'unknown-name', message, from: at.from, to: at.to };
}

function hintOf(
  name: string,
  at: Span,
  marks: Iterable<string>,
  line: SourceLine | undefined,
): string {
  const local = line?.statement?.where.find((one) => one.name === name);
  if (local !== undefined && local.from > at.from)
    return '; a local name is read only by those that stand after it in `where`';
  const unit = UNIT_WORDS.find(([, words]) => words.split(' ').includes(name.toLowerCase()));
  if (unit !== undefined) return `; the unit is written \`${unit[0]}\``;
  if (/^(rad|radians?)$/i.test(name)) return '; a plain number is an angle in radians';
  if (/^[CF]$/.test(name) && /°\s*$/.test(line?.source.slice(0, at.from) ?? ''))
    return '; `°` is a degree of angle, and temperatures have no unit here';
  if (/^[eE]\d*$/.test(name)) return ' (a power of ten is written `10^3`)';
  const nearest = findNearest(name, marks);
  if (nearest !== null) return `; did you mean \`${nearest}\`?`;
  return isMeantAsDefinition(at, line) ? `; to define it write \`${name} = …\` with one \`=\`` : '';
}

/** `R == 1200 mm` decides, and was probably to define. */
function isMeantAsDefinition(at: Span, line: SourceLine | undefined): boolean {
  const statement = line?.statement;
  return (
    statement?.kind === 'decision' &&
    statement.relations.join() === '==' &&
    statement.sides[0]?.from === at.from &&
    statement.sides[0].to === at.to
  );
}
