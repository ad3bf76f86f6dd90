/** Chains of named quadratics: each root of the tower gets a name, and the rest is written with the names. */

import { isZeroEl, toSparse } from './element';
import { formOf, type Sum } from './form';
import type { Presented } from './presentation';
import { namedTex, namedText, texName, texOf, textOf } from './text';
import type { El, Gen, Tower } from './tower';
import type { TowerStep, Written } from './types';

/** Radicands up to this many characters are written out in full. */
const SHORT = 120;

/**
 * An expression with each different root named, inner ones first. Like the expression itself it does not depend on how the value
 * came about.
 */
export function stagedExpression(s: Sum): Written {
  const names = new Map<string, string>();
  const lines: string[] = [];
  const texLines: string[] = [];
  const visit = (u: Sum): void => {
    for (const t of u.terms) {
      for (const r of t.roots) {
        const key = textOf(r);
        if (names.has(key)) continue;
        visit(r);
        const name = `r${names.size + 1}`;
        lines.push(`${name} = sqrt(${namedText(r, names)})`);
        texLines.push(`${texName(name)}=\\sqrt{${namedTex(r, names)}}`);
        names.set(key, name);
      }
    }
  };
  visit(s);
  return {
    text: [...lines, namedText(s, names)].join('; '),
    tex: gathered([...texLines, namedTex(s, names)]),
    staged: true,
  };
}

function gathered(lines: readonly string[]): string {
  return `\\begin{gathered}${lines.join('\\\\')}\\end{gathered}`;
}

/** `r1 = sqrt(…); r2 = sqrt(…); …; value`, which parses back as definitions followed by an expression. */
export function stagedValue(x: Presented): Written {
  const steps = stagedSteps(x, false);
  const names = steps.map((s) => s.name);
  const first = isZeroEl(x.im) ? 0 : 1;
  const own = names.slice(first);
  const re = polynomial(x.re, x.t, own);
  const reTex = polynomial(x.re, x.t, own, true);
  const im = polynomial(x.im, x.t, own);
  const imTex = polynomial(x.im, x.t, own, true);
  const value = isZeroEl(x.im) ? re : isZeroEl(x.re) ? `i*(${im})` : `${re}+i*(${im})`;
  const valueTex = isZeroEl(x.im)
    ? reTex
    : isZeroEl(x.re)
      ? `i\\left(${imTex}\\right)`
      : `${reTex}+i\\left(${imTex}\\right)`;
  return {
    text: [...steps.slice(first).map((s) => `${s.name} = sqrt(${s.radicand})`), value].join('; '),
    tex: gathered([
      ...steps.slice(first).map((s) => `${texName(s.name)}=\\sqrt{${s.tex}}`),
      valueTex,
    ]),
    staged: true,
  };
}

/** The roots of a tower by name; i first where the value is not real. */
export function stagedSteps(x: Presented, readable = true): TowerStep[] {
  const first = isZeroEl(x.im) ? 0 : 1;
  const names = x.t.gens.map((_, i) => `r${i + 1 + first}`);
  const steps: TowerStep[] = first === 1 ? [{ name: 'r1', radicand: '-1', tex: '-1' }] : [];
  x.t.gens.forEach((g, i) => {
    const full = readable ? shortForm(g) : null;
    steps.push({
      name: names[i] as string,
      radicand: full?.text ?? polynomial(g.rad, x.t, names),
      tex: full?.tex ?? polynomial(g.rad, x.t, names, true),
    });
  });
  return steps;
}

function shortForm(g: Gen): { text: string; tex: string } | null {
  if (g.rad.t.k > 5) return null;
  const s = formOf(g.rad);
  const text = textOf(s);
  return text.length <= SHORT ? { text, tex: texOf(s) } : null;
}

/** An element as a polynomial in the names of the generators. */
function polynomial(e: El, t: Tower, names: readonly string[], tex = false): string {
  if (isZeroEl(e)) return '0';
  const s = toSparse(e);
  let out = '';
  let count = 0;
  (s.m as readonly bigint[]).forEach((m, j) => {
    const c = BigInt(s.c[j] as number | bigint);
    if (c === 0n) return;
    const factors: string[] = [];
    for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) {
      if (!(rest & 1n)) continue;
      const name = names[t.position(s.t.gens[i] as Gen)] as string;
      factors.push(tex ? (texName(name) as string) : name);
    }
    const size = c < 0n ? -c : c;
    const parts = size === 1n && factors.length > 0 ? factors : [size.toString(), ...factors];
    out += `${c < 0n ? '-' : out === '' ? '' : '+'}${parts.join(tex ? ' ' : '*')}`;
    count++;
  });
  const den = String(e.den);
  if (den === '1') return out === '' ? '0' : out;
  if (tex) return `\\frac{${out}}{${den}}`;
  return count > 1 ? `(${out})/${den}` : `${out}/${den}`;
}
