import { attachCalls } from './attach-calls';
import { type Reading, readLine } from './read';
import { type MarkNode, type Statement, marksReadBy } from './syntax';

/** A statement as the notebook makes it, with the marks and functions that it reads. */
export interface Attached {
  readonly statement: Statement;
  readonly reads: readonly MarkNode[];
}

/** Characters of sources whose readings are kept; a reading takes some hundred times the room of its source. */
const MOST_CHARACTERS = 400_000;
/** An entry has its price whatever its text. */
const roomOf = (text: string): number => text.length + 20;

const known = new Map<string, Reading>();
let characters = 0;

/**
 * `readLine`, which is a function of the text alone, with the readings of the texts seen last kept: of a notebook that
 * is evaluated at every pause of the typing all lines but one are the same as before.
 */
export function readLineOnce(text: string): Reading {
  const found = known.get(text);
  if (found !== undefined) {
    known.delete(text);
    known.set(text, found);
    return found;
  }
  const reading = readLine(text);
  known.set(text, reading);
  characters += roomOf(text);
  for (const oldest of known.keys()) {
    if (characters <= MOST_CHARACTERS) break;
    known.delete(oldest);
    characters -= roomOf(oldest);
  }
  return reading;
}

/** What is known of a statement as it was read: its names before brackets, and what it becomes with some of them functions. */
interface Forms {
  readonly heads: readonly string[];
  readonly byFunctions: Map<string, Attached>;
}

const formsOf = new WeakMap<Statement, Forms>();

/** The statement with products read as calls of the functions given, and what it then reads; kept with the statement. */
export function attachOnce(statement: Statement, functions: ReadonlySet<string>): Attached {
  let forms = formsOf.get(statement);
  if (forms === undefined) {
    forms = { heads: headsOf(statement), byFunctions: new Map() };
    formsOf.set(statement, forms);
  }
  const { heads } = forms;
  const called = heads.length === 0 ? '' : heads.filter((head) => functions.has(head)).join(' ');
  let attached = forms.byFunctions.get(called);
  if (attached === undefined) {
    const changed = attachCalls(statement, (name, several) => several || functions.has(name));
    attached = { statement: changed, reads: marksReadBy(changed) };
    forms.byFunctions.set(called, attached);
  }
  return attached;
}

/** Every name that may be a function here, whatever the others are. */
function headsOf(statement: Statement): string[] {
  const heads = new Set<string>();
  for (const all of [true, false])
    attachCalls(statement, (name, several) => {
      heads.add(name);
      return all || several;
    });
  return [...heads].sort();
}
