import type { Cache, State } from 'swr';

/** Answers of the last few texts, so that undo is at once and a day of typing does not pile up. */
export class BoundedCache extends Map<string, State> implements Cache {
  constructor(private readonly most: number) {
    super();
  }

  override set(key: string, value: State): this {
    super.delete(key);
    super.set(key, value);
    while (this.size > this.most) {
      const oldest = this.keys().next();
      if (oldest.done) break;
      super.delete(oldest.value);
    }
    return this;
  }
}
