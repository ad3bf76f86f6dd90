/** The error codes of the result schema; `fault` marks a line that met a mistake of the program itself. */
export type ErrorCode =
  | 'syntax'
  | 'unknown-name'
  | 'duplicate-mark'
  | 'cycle'
  | 'depends-on-error'
  | 'unit-mismatch'
  | 'division-by-zero'
  | 'domain'
  | 'not-exact'
  | 'limit-size'
  | 'limit-tower'
  | 'limit-digits'
  | 'limit-time'
  | 'limit-memory'
  | 'fault';

/** A part of a line: offsets in UTF-16 units, the end not included. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

/** What is wrong with a line, in one plain sentence, and where. */
export interface Problem extends Span {
  readonly code: ErrorCode;
  readonly message: string;
}

/**
 * Carries a problem out of the depth of an evaluation to the one place that turns it into a result. Thrown without a
 * place, it is given that of the operation in hand. It never leaves `lib/language`.
 */
export class Failure extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly span: Span | null = null,
  ) {
    super(message);
    this.name = 'Failure';
  }
}

export function fail(code: ErrorCode, message: string, span: Span | null = null): never {
  throw new Failure(code, message, span);
}
