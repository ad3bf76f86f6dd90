import type {
  CellSource,
  Certified,
  CertifiedLine,
  ErrorCode,
  Result,
  Settings,
} from '@/lib/language/index';

/** What the pool asks a child. Keys name a line by the position of its cell and its number there. */
export interface Job {
  readonly job: number;
  readonly expression: string | null;
  readonly cells: readonly CellSource[];
  readonly settings: Partial<Settings>;
  readonly known: readonly (readonly [string, Result])[];
  readonly refused: readonly (readonly [string, Refusal])[];
  /** Lines that get their value but not its degree, polynomial and tower. */
  readonly brief: readonly (readonly [string, Refusal])[];
}

/** Why a line is not to be evaluated. */
export interface Refusal {
  readonly code: ErrorCode;
  readonly message: string;
}

/** What a child reports, one JSON line each, written before it goes on. */
export type Report =
  | { readonly kind: 'ready'; readonly job: 0 }
  | {
      readonly kind: 'started' | 'valued';
      readonly job: number;
      readonly cell: number;
      readonly line: number;
    }
  | {
      readonly kind: 'finished';
      readonly job: number;
      readonly cell: number;
      readonly line: number;
      readonly result: Result;
    }
  | {
      readonly kind: 'fault';
      readonly job: number;
      readonly refusal: Refusal;
      readonly detail: string;
    }
  | {
      readonly kind: 'done';
      readonly job: number;
      /** Only for an expression. */
      readonly result: Result | null;
      /** Processor time of the child since its start, in seconds. */
      readonly processorTime: number;
    }
  | { readonly kind: 'certified'; readonly job: number; readonly answer: Certified };

/** Asks a child for the certificate of one line instead of results; it answers `certified`, or `fault`. */
export interface CertifyJob {
  readonly job: number;
  readonly certify: CertifiedLine;
  readonly cells: readonly CellSource[];
  readonly settings: Partial<Settings>;
}
