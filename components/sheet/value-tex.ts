import type { Item, ListResult, Result } from './result';

/** A unit as TeX: `mm^2` upright with its power. */
export function unitTex(unit: string): string {
  const [name = unit, power] = unit.split('^');
  const base = `\\mathrm{${name.replace(/[^A-Za-z]/g, '')}}`;
  return power === undefined ? base : `${base}^{${power.replace(/[^\d-]/g, '')}}`;
}

/** Whether a text is a sum at its outermost level, so that a unit behind it would bind to its last term. */
export function isSum(text: string): boolean {
  let depth = 0;
  for (let at = 0; at < text.length; at += 1) {
    const sign = text.charAt(at);
    if (sign === '(') depth += 1;
    else if (sign === ')') depth -= 1;
    else if (at > 0 && depth === 0 && (sign === '+' || sign === '-')) return true;
  }
  return false;
}

/** TeX of an exact value with its unit, in brackets where that would bind to its last term alone. */
export function exactTex(item: Item): string {
  const { exact } = item;
  if (item.kind !== 'number') return exact.tex;
  const tex = stackLeft(exact.tex);
  if (item.unit === null) return tex;
  const value = isSum(exact.text) ? `\\left(${tex}\\right)` : tex;
  return `${value}\\,${unitTex(item.unit)}`;
}

/** TeX of what stands large on the sheet: the exact value with its unit, or the statement as written. */
export function valueTex(result: Result): string | null {
  switch (result.kind) {
    case 'number':
    case 'angle':
    case 'point':
    case 'line':
    case 'circle':
    case 'list':
      return exactTex(result);
    default:
      return result.typeset;
  }
}

/** Of a list whose text is longer nobody would read one row of brackets, */
const LONGEST_LIST = 240;
/** nor one of items as long as this. */
const LONGEST_ITEM = 60;

/** Whether a list stands large as it was written, its items in their table alone. */
export function isLongList({ exact, items }: ListResult): boolean {
  return (
    exact.staged ||
    exact.text.length > LONGEST_LIST ||
    items.some((item) => item.exact.text.length > LONGEST_ITEM)
  );
}

/** TeX of a result where there is one row for it: a long list as it was written. */
export function largeTex(result: Result): string | null {
  return result.kind === 'list' && isLongList(result) ? result.typeset : valueTex(result);
}

/** One root of a tower: `r_2 = √(…)`. */
export function stepTex({ name, tex }: { name: string; tex: string }): string {
  return `${name.replace(/^([A-Za-z])_?(\d+)$/, '$1_{$2}')}=\\sqrt{${tex}}`;
}

/** A polynomial in x from its coefficients, highest power first; whole numbers as text. */
export function polynomialTex(coefficients: readonly string[]): string {
  const degree = coefficients.length - 1;
  const terms = coefficients.flatMap((coefficient, index) => {
    if (/^-?0+$/.test(coefficient)) return [];
    const power = degree - index;
    const x = power === 0 ? '' : power === 1 ? 'x' : `x^{${power}}`;
    const size = coefficient.replace(/^-/, '');
    const sign = coefficient.startsWith('-') ? '-' : '+';
    return [`${sign}${size === '1' && x !== '' ? '' : size}${x}`];
  });
  return terms.join('').replace(/^\+/, '') || '0';
}

/** A stack of lines from the margin on instead of about its middle, so that a narrow row shows how each begins. */
export function stackLeft(tex: string): string {
  const stacked = /^\\begin\{gathered\}([\s\S]*)\\end\{gathered\}$/.exec(tex)?.[1];
  if (stacked === undefined) return tex;
  return `\\begin{aligned}&${stacked.replaceAll('\\\\', '\\\\&')}\\end{aligned}`;
}
