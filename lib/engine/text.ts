/** Expressions as plain text that parses back, and as TeX. */

import type { Sum, Term } from './form';

interface Style {
  root(inner: string): string;
  i: string;
  /** Joins the factors of a product: coefficient, i, roots. */
  product(coef: string | null, factors: string[]): string;
  quotient(top: string, bottom: string, needsBrackets: boolean): string;
}

const TEXT: Style = {
  root: (inner) => `sqrt(${inner})`,
  i: 'i',
  product: (coef, factors) => [...(coef === null ? [] : [coef]), ...factors].join('*'),
  quotient: (top, bottom, brackets) => (brackets ? `(${top})/${bottom}` : `${top}/${bottom}`),
};

const TEX: Style = {
  root: (inner) => `\\sqrt{${inner}}`,
  i: 'i',
  product: (coef, factors) => `${coef ?? ''}${factors.join(' ')}`,
  quotient: (top, bottom) => `\\frac{${top}}{${bottom}}`,
};

export function textOf(s: Sum): string {
  return render(s, TEXT);
}

export function texOf(s: Sum): string {
  return render(s, TEX);
}

/** As `textOf` and `texOf`, with a name for each root: names are found by the text of the radicand. */
export function namedText(s: Sum, names: ReadonlyMap<string, string>): string {
  return render(s, TEXT, (r) => names.get(textOf(r)));
}

export function namedTex(s: Sum, names: ReadonlyMap<string, string>): string {
  return render(s, TEX, (r) => texName(names.get(textOf(r))));
}

/** r12 as r with a lower index. */
export function texName(name: string | undefined): string | undefined {
  return name === undefined ? undefined : `r_{${name.slice(1)}}`;
}

type Naming = (radicand: Sum) => string | undefined;

function render(s: Sum, style: Style, name?: Naming): string {
  if (s.terms.length === 0) return '0';
  if (s.den === 1n) return renderTerms(s.terms, style, name);
  const negative = s.terms.every((t) => t.coef < 0n);
  const terms = negative ? s.terms.map((t) => ({ ...t, coef: -t.coef })) : s.terms;
  const body = style.quotient(renderTerms(terms, style, name), s.den.toString(), terms.length > 1);
  return negative ? `-${body}` : body;
}

function renderTerms(terms: readonly Term[], style: Style, name?: Naming): string {
  let out = '';
  for (const t of terms) {
    const negative = t.coef < 0n;
    const size = negative ? -t.coef : t.coef;
    const factors = [
      ...(t.imaginary ? [style.i] : []),
      ...t.roots.map((r) => name?.(r) ?? style.root(render(r, style, name))),
    ];
    const coef = factors.length > 0 && size === 1n ? null : size.toString();
    const body = style.product(coef, factors);
    out += negative ? `-${body}` : out === '' ? body : `+${body}`;
  }
  return out;
}

/** Whether a text has terms outside all brackets, so that a factor or unit beside it needs brackets. */
export function isSumText(text: string): boolean {
  let [before, outside] = ['', text];
  while (before !== outside) [before, outside] = [outside, outside.replace(/\([^()]*\)/g, '')];
  return /.[+-]/.test(outside);
}
