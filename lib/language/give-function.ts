import type { Evaluator } from './evaluator';
import { signatureOf } from './print';
import type { Bare, FunctionResult } from './result';
import type { FunctionStatement, MarkNode } from './syntax';

/** What a line gives that defines a function; it fails when the function reads or calls what is not there. */
export function giveFunction(
  evaluator: Evaluator,
  statement: FunctionStatement,
  reads: readonly MarkNode[],
): Bare<FunctionResult> {
  evaluator.checkFunction(statement, reads);
  return {
    kind: 'function',
    signature: signatureOf(statement),
    parameters: statement.parameters.map(({ name }) => name),
    reads: [...new Set(reads.map(({ name }) => name))],
  };
}
