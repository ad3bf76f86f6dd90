import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';
import type { KnownMark } from './names';

export interface WordAt {
  name: string;
  from: number;
  to: number;
}

/** The letters of the grammar: π and the look-alikes of signs are left out. */
const LETTER = 'A-Za-zÀ-ÖØ-öø-ÿΑ-Ωα-ορ-ω';
const NAMES = new RegExp(`[${LETTER}][${LETTER}0-9_]*|[°π√]`, 'g');
const SIGNS: Readonly<Record<string, string>> = { '°': 'deg', π: 'pi', '√': 'sqrt' };

/** Where the remark of a line begins; its length where it has none. */
export const codeLength = (line: string) => {
  const remark = line.indexOf('#');
  return remark < 0 ? line.length : remark;
};

/** The name that stands at an offset of a line, touched from either side; remarks hold none. */
export function wordAt(line: string, offset: number): WordAt | null {
  const code = line.slice(0, codeLength(line));
  for (const { 0: text, index } of code.matchAll(NAMES)) {
    const to = index + text.length;
    if (index <= offset && offset <= to) return { name: SIGNS[text] ?? text, from: index, to };
  }
  return null;
}

export type WordFacts =
  | { kind: 'mark'; mark: KnownMark }
  | { kind: 'word'; sort: 'function' | 'unit' | 'constant'; signature: string; meaning: string };

/** What is known of a name: a mark of the sheet, or a word of the language. */
export function findFacts(name: string, marks: readonly KnownMark[]): WordFacts | null {
  const mark = marks.find((one) => one.name === name);
  if (mark) return { kind: 'mark', mark };
  const ofFunction = FUNCTIONS.find((one) => one.name === name);
  if (ofFunction) return { kind: 'word', sort: 'function', ...ofFunction };
  const unit = UNITS.find((one) => one.name === name);
  if (unit) return { kind: 'word', sort: 'unit', signature: name, meaning: unit.meaning };
  const constant = CONSTANTS.find((one) => one.name === name);
  if (constant)
    return { kind: 'word', sort: 'constant', signature: name, meaning: constant.meaning };
  return null;
}

/** The signature of a function by its name, the language's or the notebook's; null for what is none. */
export const findSignature = (name: string, marks: readonly KnownMark[]): string | null =>
  FUNCTIONS.find((one) => one.name === name)?.signature ??
  marks.find((one) => one.name === name)?.signature ??
  null;

/** The facts as one text, for whoever listens. */
export function sayFacts(facts: WordFacts): string {
  if (facts.kind === 'word') return `${facts.signature}: ${facts.meaning}`;
  const { name, signature, fault, decimal, cut, size, where } = facts.mark;
  const value = fault ?? [decimal ?? size, cut && `cut size ${cut}`].filter(Boolean).join(', ');
  return signature === null
    ? `${name}, defined in ${where}: ${value}`
    : `${signature}, defined in ${where}`;
}
