/** What one evaluation may cost, beside the engine's own limits, which are counted in steps and bits. */
export const EVALUATION_LIMITS = {
  /** Characters of one expression or of one cell; a line has a tighter limit of its own. */
  sourceLength: 200_000,
  /** Characters of all cells together. */
  totalLength: 1_000_000,
  cells: 2_000,
  /** Milliseconds for a whole request, restarts included. */
  requestTime: 1_800,
  /** Milliseconds for one line; less when little of the request's time is left. */
  lineTime: 800,
  /** Megabytes of heap of a child process. */
  childHeap: 192,
  /** Seconds of processor time after which the system ends a child, whatever has become of its parent. */
  childProcessorTime: 30,
  /** Seconds of processor time after which an idle child is replaced, well before the system would end it. */
  retireProcessorTime: 20,
  /** Requests that may wait for a child. */
  waiting: 200,
} as const;
