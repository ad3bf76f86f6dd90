/** Certificates: what a value is, in a form that a short independent program can check. */

import { enclose } from './enclosure';
import { isZeroEl, place, toSparse } from './element';
import { join } from './join';
import { degreeOf, minimalPolynomialOf, type Cx } from './minimal-polynomial';
import { homOf } from './residues';
import { character } from './residues';
import type { El, Field, Gen, Tower } from './tower';
import type { Certificate, CertificateElement, CertificateRoot } from './types';
import { encloseRoot } from './enclosure';

const BITS = 128;

export function certificateOf(x: Cx): Certificate {
  const f = x.re.t.field;
  const j = join(x.re.t, x.im.t);
  const degree = degreeOf(x);
  const range = (e: El): { low: string; high: string; bits: number } => {
    const r = enclose(e, BITS);
    return { low: r.low.toString(), high: r.high.toString(), bits: BITS };
  };
  return {
    format: 'surdwork-certificate',
    version: 1,
    roots: rootsOf(f, j.t),
    value: { re: elementOf(place(x.re, j.t, j.left)), im: elementOf(place(x.im, j.t, j.right)) },
    minimalPolynomial: degree <= f.budget.limits.degree ? minimalPolynomialOf(x).map(String) : null,
    degree,
    enclosure: { re: range(x.re), im: isZeroEl(x.im) ? { low: '0', high: '0', bits: BITS } : range(x.im) },
  };
}

function elementOf(e: El): CertificateElement {
  const s = toSparse(e);
  const terms = (s.m as readonly bigint[]).map((m, k): [number[], string] => {
    const set: number[] = [];
    for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) if (rest & 1n) set.push(i);
    return [set, String(s.c[k])];
  });
  return { denominator: String(e.den), terms };
}

function rootsOf(f: Field, t: Tower): CertificateRoot[] {
  let below = f.base;
  return t.gens.map((g, i): CertificateRoot => {
    const e = encloseRoot(f, g, BITS);
    const how = below === g.rad.t ? { positions: null, images: null } : { positions: g.rad.t.positionsIn(below), images: null };
    const root = {
      name: `r${i + 1}`,
      radicand: elementOf(place(g.rad, below, how)),
      enclosure: { low: e.low.toString(), high: e.high.toString(), bits: BITS },
      witness: witness(below, g),
    };
    below = below.child(g);
    return root;
  });
}

function witness(below: Tower, g: Gen): { prime: number; roots: number[] } | null {
  const effort = { left: 200_000 };
  for (let j = 0; ; j++) {
    const h = homOf(below, j, effort);
    if (h === null) return null;
    if (character(g.rad, below, h) < 0) return { prime: h.p, roots: [...h.roots] };
  }
}
