import type {
  CellSource,
  Certified,
  CertifiedLine,
  Outcome,
  Refusal,
  Settings,
} from '@/lib/language/index';

export type { Refusal } from '@/lib/language/index';

/** One line to be evaluated, with all that its outcome depends on. */
export interface Task {
  readonly source: string;
  /** Names the value of the line: its text and, in the same way, what it reads. */
  readonly value: string;
  /** Each mark and function that the line reads with the name of its value; null for one that has none. */
  readonly reads: readonly (readonly [mark: string, value: string | null])[];
  /** Those of them that the notebook defines as functions, whether or not they have a value. */
  readonly functions: readonly string[];
  /** Which of the settings of the job; null when only the value is needed, for others that read it. */
  readonly settings: number | null;
}

/** What the pool asks a child: lines in an order in which each comes after those that it reads. */
export interface Job {
  readonly job: number;
  readonly tasks: readonly Task[];
  readonly settings: readonly Settings[];
  /** Whether values may be kept for later jobs. */
  readonly keep: boolean;
  /** Values that are not to be worked out, by their names. */
  readonly refused: readonly (readonly [value: string, Refusal])[];
  /** Tasks that get their value but not its degree, polynomial and tower, by their position. */
  readonly brief: readonly (readonly [task: number, Refusal])[];
}

/** A report as it is sent: with the milliseconds of processor time that the child has had since its start. */
export type SentReport = Report & { readonly spent: number };

/** What a child reports, one JSON line each, written before it goes on. Tasks are named by their position in the job. */
export type Report =
  | { readonly kind: 'ready'; readonly job: 0 }
  | { readonly kind: 'started' | 'valued'; readonly job: number; readonly task: number }
  | {
      readonly kind: 'finished';
      readonly job: number;
      readonly task: number;
      readonly outcome: Outcome;
      /** Whether it is the outcome for ever; false when a refusal played a part. */
      readonly lasting: boolean;
    }
  | {
      readonly kind: 'fault';
      readonly job: number;
      readonly refusal: Refusal;
      readonly detail: string;
    }
  | { readonly kind: 'done'; readonly job: number }
  | { readonly kind: 'certified'; readonly job: number; readonly answer: Certified };

/** Asks a child for the certificate of one line instead of results; it answers `certified`, or `fault`. */
export interface CertifyJob {
  readonly job: number;
  readonly certify: CertifiedLine;
  readonly cells: readonly CellSource[];
  readonly settings: Partial<Settings>;
}
