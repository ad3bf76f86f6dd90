import { classOfWord } from '../names';
import { ConstantName, FunctionName, UnitName, WhereWord } from './cell.parser.terms';

const TERMS = { function: FunctionName, unit: UnitName, constant: ConstantName, word: WhereWord };

/** Called by the parser for each name: the token that a kept word becomes, or -1 for a name that may be a mark. */
export function specializeName(name: string, _stack: unknown): number {
  const wordClass = classOfWord(name);
  return wordClass === null ? -1 : TERMS[wordClass];
}
