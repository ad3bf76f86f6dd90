/** Random exact expressions: trees of the five operations over small integers, nested up to a given depth of roots. */

import fc from 'fast-check';
import type { Engine, Num } from '../../lib/engine/index';

export type Tree =
  | { op: 'integer'; n: number }
  | { op: 'i' }
  | { op: 'sqrt'; a: Tree }
  | { op: '+' | '-' | '*' | '/'; a: Tree; b: Tree };

/** An integer, with zero, units and squares among the likely ones. */
const leaf: fc.Arbitrary<Tree> = fc
  .oneof(
    { weight: 2, arbitrary: fc.constantFrom(0, 1, -1, 4, 9) },
    { weight: 5, arbitrary: fc.integer({ min: -12, max: 12 }) },
  )
  .map((n): Tree => ({ op: 'integer', n }));

function grow(depth: number, complex: boolean): fc.Arbitrary<Tree> {
  const atoms = complex
    ? fc.oneof(
        { weight: 5, arbitrary: leaf },
        { weight: 1, arbitrary: fc.constant<Tree>({ op: 'i' }) },
      )
    : leaf;
  if (depth === 0) return atoms;
  const lower = grow(depth - 1, complex);
  const root = lower.map((a): Tree => ({ op: 'sqrt', a }));
  const small = fc.oneof(atoms, root);
  const pair = fc
    .tuple(fc.constantFrom('+' as const, '-' as const, '*' as const, '/' as const), small, small)
    .map(([op, a, b]): Tree => ({ op, a, b }));
  return fc.oneof(
    { weight: 1, arbitrary: lower },
    { weight: 2, arbitrary: root },
    { weight: 3, arbitrary: pair },
  );
}

/** Trees with roots nested up to `depth`; the square of a tree and products that hide squares come up by themselves and below. */
export function trees(depth: number, complex = false): fc.Arbitrary<Tree> {
  const t = grow(depth, complex);
  const hidden = grow(Math.max(0, depth - 1), complex).map((a): Tree => ({
    op: 'sqrt',
    a: { op: '*', a, b: a },
  }));
  return fc.oneof({ weight: 5, arbitrary: t }, { weight: 1, arbitrary: hidden });
}

export function show(t: Tree): string {
  switch (t.op) {
    case 'integer':
      return t.n < 0 ? `(${t.n})` : String(t.n);
    case 'i':
      return 'i';
    case 'sqrt':
      return `sqrt(${show(t.a)})`;
    default:
      return `(${show(t.a)}${t.op}${show(t.b)})`;
  }
}

/** The value of a tree; division by an exact zero throws the engine's failure. */
export function valueOf(e: Engine, t: Tree): Num {
  switch (t.op) {
    case 'integer':
      return e.integer(t.n);
    case 'i':
      return e.i;
    case 'sqrt':
      return e.sqrt(valueOf(e, t.a));
    case '+':
      return e.add(valueOf(e, t.a), valueOf(e, t.b));
    case '-':
      return e.sub(valueOf(e, t.a), valueOf(e, t.b));
    case '*':
      return e.mul(valueOf(e, t.a), valueOf(e, t.b));
    case '/':
      return e.div(valueOf(e, t.a), valueOf(e, t.b));
  }
}
