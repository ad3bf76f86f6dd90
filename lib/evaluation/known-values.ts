import { type PackedValue, sizeOfPacked } from '@/lib/language/index';

/**
 * The values worked out last, by the names that `Task.value` gives them; null for a line that has none. What was not
 * asked for longest is forgotten once all together exceed a size, counted in integers.
 */
export class KnownValues {
  private readonly values = new Map<string, { value: PackedValue | null; size: number }>();
  private size = 0;

  constructor(private readonly capacity: number) {}

  /** Undefined for a value that is not known. */
  find(name: string): PackedValue | null | undefined {
    const known = this.values.get(name);
    if (known === undefined) return undefined;
    this.values.delete(name);
    this.values.set(name, known);
    return known.value;
  }

  keep(name: string, value: PackedValue | null): void {
    this.forget(name);
    const size = 16 + (value === null ? 0 : sizeOfPacked(value));
    if (size > this.capacity / 8) return;
    this.values.set(name, { value, size });
    this.size += size;
    for (const oldest of this.values.keys()) {
      if (this.size <= this.capacity) break;
      this.forget(oldest);
    }
  }

  private forget(name: string): void {
    this.size -= this.values.get(name)?.size ?? 0;
    this.values.delete(name);
  }
}
