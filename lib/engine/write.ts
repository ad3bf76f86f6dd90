/**
 * Values in writing.
 *
 * A few expressions are made for a value and the first in this order is taken: lowest nesting, fewest different roots,
 * fewest digits. One that is too wide to read is staged: the roots of the tower are named one after another,
 * `r1 = sqrt(17); r2 = sqrt(34-2*r1); …`, and the value is written with the names.
 */

import { countTerms, isZeroEl } from './element';
import { words } from './int';
import { addSums, digitsOf, formOf, largestOf, timesI, type Manner, type Sum } from './form';
import type { Cx } from './complex';
import { complexForm } from './complex-form';
import { present } from './presentation';
import { stagedExpression, stagedSteps, stagedValue } from './staged';
import { texOf, textOf } from './text';
import type { TowerStep, Written } from './types';

/** Wider than this (in characters of text), a nested value is staged. */
const TOO_WIDE = 600;

export function writeValue(x: Cx): Written {
  const s = expressionOf(x);
  if (s === null) return stagedValue(present(x));
  const text = textOf(s);
  if (text.length <= TOO_WIDE || s.depth < 2) return { text, tex: texOf(s), staged: false };
  return stagedExpression(s);
}

/** The expression chosen for x, or null when none is worth making. */
export function expressionOf(x: Cx): Sum | null {
  if (tooLarge(x)) return null;
  const variants = MANNERS.map((m) => bothParts(x, m));
  if (!isZeroEl(x.im) && !isZeroEl(x.re)) variants.push(complexForm(x));
  return variants.reduce((best, s) => (costlier(best, s) ? s : best));
}

const MANNERS: readonly Manner[] = ['single', 'conjugates'];

function bothParts(x: Cx, manner: Manner): Sum {
  return isZeroEl(x.im)
    ? formOf(x.re, manner)
    : addSums([formOf(x.re, manner), timesI(formOf(x.im, manner))]);
}

/** Towers and coordinates beyond which squares of parts are not worth working out for reading: then the tower itself is shown. */
function tooLarge(x: Cx): boolean {
  return [x.re, x.im].some(
    (e) =>
      e.t.depth > 1 &&
      (e.t.k > 10 || countTerms(e) > 48 || e.c.some((c) => typeof c === 'bigint' && words(c) > 10)),
  );
}

function costlier(a: Sum, b: Sum): boolean {
  const depth = nesting(a) - nesting(b);
  if (depth !== 0) return depth > 0;
  const roots = differentRoots(a) - differentRoots(b);
  if (roots !== 0) return roots > 0;
  const [m, n] = [largestOf(a), largestOf(b)];
  return m !== n ? m > n : digitsOf(a) > digitsOf(b);
}

/** Nesting with i counted as a root, as it is where a reader sees √−1. */
function nesting(s: Sum): number {
  let n = 0;
  for (const t of s.terms) {
    if (t.imaginary) n = Math.max(n, 1);
    for (const r of t.roots) n = Math.max(n, 1 + nesting(r));
  }
  return n;
}

function differentRoots(s: Sum): number {
  return rootsIn(s).length;
}

/** The different roots in an expression, inner ones first; i is the root of −1. */
function rootsIn(s: Sum): { text: string; tex: string; depth: number }[] {
  const seen = new Map<string, { text: string; tex: string; depth: number }>();
  const visit = (u: Sum): void => {
    for (const t of u.terms) {
      if (t.imaginary) seen.set('-1', { text: '-1', tex: '-1', depth: 0 });
      for (const r of t.roots) {
        visit(r);
        const text = textOf(r);
        if (!seen.has(text)) seen.set(text, { text, tex: texOf(r), depth: nesting(r) });
      }
    }
  };
  visit(s);
  return [...seen.values()].sort((a, b) => a.depth - b.depth);
}

/**
 * The square roots that x needs, lowest first. Those of the expression itself where there are no more of them than the
 * tower has; else those of the tower, radicands written out while short and with the names of lower roots beyond.
 */
export function towerOf(x: Cx): TowerStep[] {
  const steps = stagedSteps(present(x));
  const s = expressionOf(x);
  const roots = s === null ? null : rootsIn(s);
  if (roots === null || roots.length > steps.length) return steps;
  return roots.map((r, i) => ({ name: `r${i + 1}`, radicand: r.text, tex: r.tex }));
}
