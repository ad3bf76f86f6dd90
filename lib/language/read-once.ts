import { attachCalls } from './attach-calls';
import { readLine } from './read';
import { rememberByText } from './remember-by-text';
import { type MarkNode, type Statement, marksReadBy } from './syntax';

/** A statement as the notebook makes it, with the marks and functions that it reads. */
export interface Attached {
  readonly statement: Statement;
  readonly reads: readonly MarkNode[];
}

/** `readLine`, which is a function of the text alone, with the readings of the texts seen last kept. */
export const readLineOnce = rememberByText(readLine);

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
