import { createHash } from 'node:crypto';

/** Keeps answers, as JSON text, under a key that names all that they depend on. A store may forget at any time. */
export interface AnswerStore {
  read(key: string): Promise<string | null>;
  write(key: string, answer: string): Promise<void>;
}

/** The key of an answer: SHA-256 of the program's own identity and of what was asked. */
export function keyOfAnswer(program: string, asked: unknown): string {
  return createHash('sha256')
    .update(JSON.stringify([program, asked]))
    .digest('hex');
}

/** A store in memory that forgets what was not asked for longest, once its texts together exceed a size. */
export class MemoryStore implements AnswerStore {
  private readonly answers = new Map<string, string>();
  private size = 0;

  /** `capacity` counts characters. */
  constructor(private readonly capacity = 16_000_000) {}

  read(key: string): Promise<string | null> {
    const answer = this.answers.get(key);
    if (answer === undefined) return Promise.resolve(null);
    this.answers.delete(key);
    this.answers.set(key, answer);
    return Promise.resolve(answer);
  }

  write(key: string, answer: string): Promise<void> {
    if (answer.length <= this.capacity / 8) this.keep(key, answer);
    return Promise.resolve();
  }

  private keep(key: string, answer: string): void {
    this.forget(key);
    this.answers.set(key, answer);
    this.size += answer.length;
    for (const oldest of this.answers.keys()) {
      if (this.size <= this.capacity) break;
      this.forget(oldest);
    }
  }

  private forget(key: string): void {
    this.size -= this.answers.get(key)?.length ?? 0;
    this.answers.delete(key);
  }
}

/** Asks a quick store first and a lasting one second, and remembers in the quick one what the other knew. */
export function layered(quick: AnswerStore, lasting: AnswerStore): AnswerStore {
  return {
    async read(key) {
      const near = await quick.read(key);
      if (near !== null) return near;
      const far = await lasting.read(key);
      if (far !== null) await quick.write(key, far);
      return far;
    },
    async write(key, answer) {
      await Promise.all([quick.write(key, answer), lasting.write(key, answer)]);
    },
  };
}
