/** Certificates: what a value is, in a form that a short independent program can check. Format: README.md. */

import { isZeroEl, toSparse } from './element';
import { isqrt, splitSquare } from './integers';
import { OverLimit } from './limits';
import type { Cx } from './complex';
import { minimalPolynomialOf } from './minimal-polynomial';
import { present } from './presentation';
import { character, homOf } from './residues';
import type { El, Gen, Tower } from './tower';
import type {
  Certificate,
  CertificateElement,
  CertificateEnclosure,
  CertificateRoot,
  CertificateWitness,
} from './types';

/** How many radicands are tried for a witness. */
const WITNESS_EFFORT = 100_000;

/** The certificate of x. Costs its minimal polynomial; `degree` as there. */
export function certificateOf(x: Cx): Certificate {
  const minimalPolynomial = minimalPolynomialOf(x).map(String);
  const p = present(x);
  const radicands = p.t.gens.map((g) => elementOf(g.rad, p.t));
  const witnesses = witnessesOf(p.t);
  const re = elementOf(p.re, p.t);
  const im = elementOf(p.im, p.t);
  const limit = p.t.field.budget.limits.integerBits;
  for (let bits = 128; bits <= limit; bits *= 2) {
    const enclosures = encloseRoots(radicands, bits);
    if (enclosures === null) continue;
    const roots = p.t.gens.map((_, i): CertificateRoot => ({
      name: `r${i + 1}`,
      radicand: radicands[i] as CertificateElement,
      enclosure: enclosures[i] as CertificateEnclosure,
      witness: witnesses[i] as CertificateWitness,
    }));
    const enclosure = { re: range(re, enclosures, bits), im: range(im, enclosures, bits) };
    if (
      [enclosure.re, enclosure.im].some(
        (e) => e.low.startsWith('-') && !e.high.startsWith('-') && e.high !== '0',
      )
    ) {
      continue;
    }
    return {
      format: 'surdwork-certificate',
      version: 1,
      roots,
      value: { re, im },
      degree: minimalPolynomial.length - 1,
      minimalPolynomial,
      enclosure,
    };
  }
  throw new OverLimit('integerBits', limit, 2 * limit);
}

function elementOf(e: El, t: Tower): CertificateElement {
  if (isZeroEl(e)) return { denominator: '1', terms: [] };
  const s = toSparse(e);
  const terms = (s.m as readonly bigint[]).map((m, j): [number[], string] => {
    const set: number[] = [];
    for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) {
      if (rest & 1n) set.push(t.position(e.t.gens[i] as Gen));
    }
    return [set, String(s.c[j])];
  });
  return { denominator: String(e.den), terms };
}

/** Enclosures of all roots, or null when a radicand is not seen to be positive at this precision. */
function encloseRoots(
  radicands: readonly CertificateElement[],
  bits: number,
): CertificateEnclosure[] | null {
  const out: CertificateEnclosure[] = [];
  const shift = BigInt(bits);
  for (const r of radicands) {
    const d = range(r, out, bits);
    if (BigInt(d.low) <= 0n) return null;
    out.push({
      low: isqrt(BigInt(d.low) << shift).toString(),
      high: (isqrt(BigInt(d.high) << shift) + 1n).toString(),
      bits,
    });
  }
  return out;
}

/** Interval of an element: each term's product of enclosures, rounded outwards once, then the sum. */
function range(
  e: CertificateElement,
  roots: readonly CertificateEnclosure[],
  bits: number,
): CertificateEnclosure {
  let low = 0n;
  let high = 0n;
  const shift = BigInt(bits);
  for (const [set, c] of e.terms) {
    const n = BigInt(c);
    let a = n;
    let b = n;
    for (const i of set) {
      const r = roots[i] as CertificateEnclosure;
      a *= BigInt(n < 0n ? r.high : r.low);
      b *= BigInt(n < 0n ? r.low : r.high);
    }
    const down = shift * BigInt(set.length - 1);
    low += set.length === 0 ? a << shift : a >> down;
    high += set.length === 0 ? b << shift : -(-b >> down);
  }
  const den = BigInt(e.denominator);
  return { low: floor(low, den).toString(), high: (-floor(-high, den)).toString(), bits };
}

function floor(n: bigint, d: bigint): bigint {
  const q = n / d;
  return n < 0n && q * d !== n ? q - 1n : q;
}

/** Prime factors for the roots of integers where all are known, residues for the rest. */
function witnessesOf(t: Tower): CertificateWitness[] {
  const factors = t.gens.map((g) => (g.int === 0 ? [] : factorsOf(BigInt(g.int))));
  const factored = !factors.includes(null);
  let below = t.field.base;
  return t.gens.map((g, i) => {
    const known = factored && g.int !== 0 ? (factors[i] as string[]) : null;
    const out = known === null ? residueWitness(below, g) : { factors: known };
    below = below.child(g);
    return out;
  });
}

function factorsOf(n: bigint): string[] | null {
  const split = splitSquare(n);
  return split.complete && split.square === 1n ? split.factors.map(String) : null;
}

function residueWitness(below: Tower, g: Gen): CertificateWitness {
  const effort = { left: WITNESS_EFFORT };
  for (let j = 0; ; j++) {
    const h = homOf(below, j, effort);
    if (h === null) throw new OverLimit('steps', WITNESS_EFFORT, WITNESS_EFFORT + 1);
    if (character(g.rad, below, h) < 0) return { prime: h.p, residues: [...h.roots] };
  }
}
