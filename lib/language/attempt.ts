import type { Engine } from '../engine/index';
import { Failure } from './failure';

/** Runs work within the engine's limits; what the engine reports as data is thrown on as a `Failure` without a place. */
export function attemptOrFail<T>(engine: Engine, work: () => T): T {
  let own: Failure | null = null;
  const outcome = engine.attempt((): { value: T } | null => {
    try {
      return { value: work() };
    } catch (error) {
      // The boundary of the engine lets only its own failures become data; ours go round it.
      if (!(error instanceof Failure)) throw error;
      own = error;
      return null;
    }
  });
  if (outcome.kind !== 'value') throw new Failure(outcome.code, outcome.message);
  if (outcome.value !== null) return outcome.value.value;
  throw own ?? new Error('An attempt ended without a value and without a failure.');
}
