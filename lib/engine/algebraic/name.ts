/** Names of numbers beyond square roots, carried through sums and products with rationals: (p + q·name)/d. */
import { gcdOf } from '../polynomials/integer-poly';

export interface Name {
  readonly text: string;
  readonly tex: string;
}

/** (p + q·name)/d in lowest terms, q ≠ 0, d > 0. */
export interface Named {
  readonly name: Name;
  readonly p: bigint;
  readonly q: bigint;
  readonly d: bigint;
}

export const plainName = (text: string, tex: string): Named => ({
  name: { text, tex },
  p: 0n,
  q: 1n,
  d: 1n,
});

/** The named number times n/d ≠ 0, plus a/b. */
export function changeNamed(x: Named, n: bigint, d: bigint, a: bigint, b: bigint): Named {
  const p = x.p * n * b + a * x.d * d;
  const q = x.q * n * b;
  const bottom = x.d * d * b;
  const g = gcdOf(gcdOf(p, q), bottom) * (bottom < 0n ? -1n : 1n);
  return { name: x.name, p: p / g, q: q / g, d: bottom / g };
}

/** Writes it as text that parses back, and as TeX. */
export function writeNamed({ name, p, q, d }: Named): Name {
  const size = q < 0n ? -q : q;
  const textTerm = size === 1n ? name.text : `${size}*${name.text}`;
  const texTerm = size === 1n ? name.tex : `${size}${name.tex}`;
  const join = (term: string): string => {
    if (p === 0n) return q < 0n ? `-${term}` : term;
    if (q < 0n) return `${p}-${term}`;
    return p < 0n ? `${term}-${-p}` : `${p}+${term}`;
  };
  if (d === 1n) return { text: join(textTerm), tex: join(texTerm) };
  const alone = p === 0n;
  return {
    text: alone ? `${join(textTerm)}/${d}` : `(${join(textTerm)})/${d}`,
    tex: alone && q < 0n ? `-\\frac{${texTerm}}{${d}}` : `\\frac{${join(texTerm)}}{${d}}`,
  };
}

/** Text of an integer polynomial in x, constant term first in the array, highest power first in the text. */
export function writePolynomial(
  f: readonly bigint[],
  times: string,
  power: (k: number) => string,
): string {
  let out = '';
  for (let k = f.length - 1; k >= 0; k--) {
    const c = f[k] as bigint;
    if (c === 0n) continue;
    const size = c < 0n ? -c : c;
    const x = k === 0 ? '' : k === 1 ? 'x' : power(k);
    const body = k > 0 && size === 1n ? x : k === 0 ? `${size}` : `${size}${times}${x}`;
    out += c < 0n ? `-${body}` : out === '' ? body : `+${body}`;
  }
  return out;
}
