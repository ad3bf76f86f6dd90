/** What one evaluation may cost, beside the engine's own limits, which are counted in steps and bits. */
export const EVALUATION_LIMITS = {
  /** Characters of one expression or of one cell; a line has a tighter limit of its own. */
  sourceLength: 200_000,
  /** Characters of all cells together. */
  totalLength: 1_000_000,
  cells: 2_000,
  /** Milliseconds for a whole request, restarts included, and for each line of it that is to be evaluated. */
  requestTime: 1_800,
  requestTimePerLine: 10,
  /** Milliseconds for a request however many lines it has. */
  longestRequestTime: 15_000,
  /** Lines that one child is given at a time, so that several can share a large request. */
  linesPerJob: 60,
  /** Milliseconds for one line; less when little of the request's time is left. */
  lineTime: 800,
  /** Megabytes of memory of a child process, looked at every few milliseconds while it works. */
  childMemory: 224,
  /** Megabytes of heap at which the run time itself ends a child: the stop behind `childMemory`. */
  childHeap: 320,
  /** Integers in the values that a child keeps for the next request. */
  childValues: 400_000,
  /** Characters of outcomes that the server keeps in memory. */
  memory: 32_000_000,
  /** Milliseconds between two looks at a child's memory. */
  memoryWatch: 40,
  /** Seconds of processor time after which the system ends a child, whatever has become of its parent. */
  childProcessorTime: 30,
  /** Seconds of processor time after which an idle child is replaced, well before the system would end it. */
  retireProcessorTime: 20,
  /** Requests that may wait for a child. */
  waiting: 200,
} as const;

export type EvaluationLimits = { readonly [name in keyof typeof EVALUATION_LIMITS]: number };
