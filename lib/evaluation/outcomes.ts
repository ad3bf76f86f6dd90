import type { Outcome } from '@/lib/language/index';

/** Keeps outcomes under the names that a plan gives them, for all instances together. A store may forget at any time. */
export interface OutcomeStore {
  read(names: readonly string[]): Promise<ReadonlyMap<string, Outcome>>;
  write(outcomes: ReadonlyMap<string, Outcome>): Promise<void>;
}

/** A store in memory that forgets what was not asked for longest, once all together exceed a size. */
export class OutcomeMemory {
  private readonly kept = new Map<string, { outcome: Outcome; size: number }>();
  private size = 0;

  /** `capacity` counts the characters of the outcomes as JSON. */
  constructor(private readonly capacity: number) {}

  find(name: string): Outcome | undefined {
    const found = this.kept.get(name);
    if (found === undefined) return undefined;
    this.kept.delete(name);
    this.kept.set(name, found);
    return found.outcome;
  }

  keep(name: string, outcome: Outcome): void {
    this.forget(name);
    const size = JSON.stringify(outcome).length;
    if (size > this.capacity / 8) return;
    this.kept.set(name, { outcome, size });
    this.size += size;
    for (const oldest of this.kept.keys()) {
      if (this.size <= this.capacity) break;
      this.forget(oldest);
    }
  }

  private forget(name: string): void {
    this.size -= this.kept.get(name)?.size ?? 0;
    this.kept.delete(name);
  }
}

/** What is known of some outcomes: from memory, and for the rest from the lasting store, if there is one that answers. */
export async function findOutcomes(
  names: ReadonlySet<string>,
  memory: OutcomeMemory,
  lasting: OutcomeStore | null,
): Promise<Map<string, Outcome>> {
  const found = new Map<string, Outcome>();
  const unknown: string[] = [];
  for (const name of names) {
    const outcome = memory.find(name);
    if (outcome === undefined) unknown.push(name);
    else found.set(name, outcome);
  }
  if (lasting === null || unknown.length === 0) return found;
  // A database that cannot be reached just now costs time, not answers.
  const read = await lasting.read(unknown).catch(() => new Map<string, Outcome>());
  for (const [name, outcome] of read) {
    memory.keep(name, outcome);
    found.set(name, outcome);
  }
  return found;
}
