/** Chains of named quadratics: each root of the tower gets a name, and the rest is written with the names. */

import { isZeroEl, toSparse } from './element';
import { formOf } from './form';
import type { Presented } from './presentation';
import { texOf, textOf } from './text';
import type { El, Gen, Tower } from './tower';
import type { TowerStep, Written } from './types';

/** Radicands up to this many characters are written out in full. */
const SHORT = 120;

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
  const valueTex = isZeroEl(x.im) ? reTex : isZeroEl(x.re) ? `i\\left(${imTex}\\right)` : `${reTex}+i\\left(${imTex}\\right)`;
  return {
    text: [...steps.slice(first).map((s) => `${s.name} = sqrt(${s.radicand})`), value].join('; '),
    tex: `\\begin{gathered}${[
      ...steps.slice(first).map((s) => `${texName(s.name)}=\\sqrt{${s.tex}}`),
      valueTex,
    ].join('\\\\')}\\end{gathered}`,
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

function texName(name: string): string {
  return `r_{${name.slice(1)}}`;
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
      factors.push(tex ? texName(name) : name);
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
