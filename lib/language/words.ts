import { CONSTANTS, FUNCTIONS, UNITS, classOfWord, findUnit } from './names';

/** What a kept word is, to be read after "is": `the unit metre`, `a function`, `the imaginary unit`. */
export function describeWord(word: string): string {
  switch (classOfWord(word)) {
    case 'unit':
      return `the unit ${findUnit(word)?.meaning.split(',')[0] ?? word}`;
    case 'function':
      return 'the name of a function';
    case 'constant':
      return word === 'i' ? 'the imaginary unit' : 'the constant π';
    case 'word':
      return 'a word of the language';
    case null:
      return 'a free name';
  }
}

/** A free name near to a kept word. */
export function suggestMark(word: string): string {
  const capital = word.charAt(0).toUpperCase() + word.slice(1);
  return classOfWord(capital) === null ? capital : `${word}_1`;
}

/**
 * The known name that a mistyped one most likely stands for, or null.
 * A name is near when a third of its letters at most, and two at most, are wrong, missing, surplus or swapped
 * (Damerau's distance in its restricted form); another case of letters always counts as near.
 * Cost: product of the lengths for each known name.
 */
export function findNearest(name: string, marks: Iterable<string>): string | null {
  const known = [...marks, ...[...FUNCTIONS, ...UNITS, ...CONSTANTS].map((entry) => entry.name)];
  const sameLetters = known.find((other) => other.toLowerCase() === name.toLowerCase());
  if (sameLetters !== undefined) return sameLetters;
  const allowed = Math.min(2, Math.floor(name.length / 3));
  let best: string | null = null;
  let least = allowed + 1;
  for (const other of known) {
    if (Math.abs(other.length - name.length) >= least) continue;
    const distance = editDistance(name, other);
    if (distance < least) {
      least = distance;
      best = other;
    }
  }
  return best;
}

function editDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, column) => column);
  for (let row = 1; row <= a.length; row += 1) {
    const current = [row];
    for (let column = 1; column <= b.length; column += 1) {
      const change = a[row - 1] === b[column - 1] ? 0 : 1;
      let cost = Math.min(
        at(last, column) + 1,
        at(current, column - 1) + 1,
        at(last, column - 1) + change,
      );
      if (row > 1 && column > 1 && a[row - 1] === b[column - 2] && a[row - 2] === b[column - 1]) {
        cost = Math.min(cost, at(beforeLast, column - 2) + 1);
      }
      current.push(cost);
    }
    beforeLast = last;
    last = current;
  }
  return at(last, b.length);
}

const at = (row: readonly number[], column: number): number => row[column] ?? Infinity;
