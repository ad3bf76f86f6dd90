/** Sums of named numbers as text that parses back, and as TeX. */
import { isRealCx, type Cx } from '../complex';
import { isRationalEl, numerator, scaleEl } from '../element';
import * as Z from '../int';
import { gcdOf } from '../polynomials/integer-poly';
import { isSumText } from '../text';
import { writeValue } from '../write';
import type { Atom, Factor } from './atoms';
import type { NamedSum, Term } from './named-sum';

export interface Name {
  readonly text: string;
  readonly tex: string;
}

/** The sum over one denominator, or null where a coefficient is too long to stand in it. */
export function writeNamedSum(sum: NamedSum): Name | null {
  const denominator = sum.reduce((d, { coefficient }) => {
    const own = denominatorOf(coefficient);
    return (d * own) / gcdOf(d, own);
  }, 1n);
  const terms: Name[] = [];
  for (const term of sum) {
    const written = writeTerm(term, denominator);
    if (written === null) return null;
    terms.push(written);
  }
  // A sum starts with a term that is added, where there is one.
  const first = terms.findIndex(({ text }) => !text.startsWith('-'));
  if (first > 0) terms.unshift(...terms.splice(first, 1));
  let [text, tex] = ['', ''];
  for (const written of terms) {
    const join = written.text.startsWith('-') || text === '' ? '' : '+';
    text += join + written.text;
    tex += join + written.tex;
  }
  if (text === '') return { text: '0', tex: '0' };
  if (denominator === 1n) return { text, tex };
  if (isSumText(text))
    return { text: `(${text})/${denominator}`, tex: over(tex, `${denominator}`) };
  return {
    text: `${text}/${denominator}`,
    tex: tex.startsWith('-')
      ? `-${over(tex.slice(1), `${denominator}`)}`
      : over(tex, `${denominator}`),
  };
}

const over = (top: string, bottom: string): string => `\\frac{${top}}{${bottom}}`;

function denominatorOf(x: Cx): bigint {
  const [a, b] = [BigInt(x.re.den), BigInt(x.im.den)];
  return (a * b) / gcdOf(a, b);
}

/** The term times `by`, with its sign in front. */
function writeTerm({ coefficient, factors }: Term, by: bigint): Name | null {
  const n = Z.small(by);
  const scaled: Cx = { re: scaleEl(coefficient.re, n), im: scaleEl(coefficient.im, n) };
  if (factors.length === 0) {
    const { text, tex, staged } = writeValue(scaled);
    return staged ? null : { text, tex };
  }
  const { tangent, others } = takeTangent(factors);
  const top = [...others.filter(({ power }) => power > 0).map(writeFactor), ...tangent];
  const bottom = others
    .filter(({ power }) => power < 0)
    .map(({ atom, power }) => writeFactor({ atom, power: -power }));
  const lead = writeCoefficient(scaled, top.length === 0);
  if (lead === null) return null;
  const above = {
    text: [...(lead.text === '' ? [] : [lead.text]), ...top.map(({ text }) => text)].join('*'),
    tex: lead.tex + top.map(({ tex }) => tex).join(' '),
  };
  const below = bottom.map(({ text }) => text).join('*');
  if (bottom.length === 0) return { text: lead.sign + above.text, tex: lead.sign + above.tex };
  return {
    text: `${lead.sign}${above.text}/${bottom.length > 1 ? `(${below})` : below}`,
    tex:
      lead.sign +
      over(
        above.tex,
        bottom.length > 1
          ? bottom.map(({ tex }) => tex).join(' ')
          : withoutBrackets(bottom[0]?.tex ?? ''),
      ),
  };
}

/** A fraction bar needs no brackets around a single sum under it. */
const withoutBrackets = (tex: string): string =>
  /^\\left\((?:(?!\\right\)).)*\\right\)$/.test(tex) ? tex.slice(6, -7) : tex;

/** sin θ over cos θ taken out as tan θ, or as the cotangent of the other angle where θ's cosine is written as a sine. */
function takeTangent(factors: readonly Factor[]): { tangent: Name[]; others: readonly Factor[] } {
  const above = factors.find(({ atom, power }) => atom.kind === 'cosine' && power === 1);
  const below = factors.find(({ atom, power }) => atom.kind === 'cosine' && power === -1);
  if (above?.atom.kind !== 'cosine' || below?.atom.kind !== 'cosine') {
    return { tangent: [], others: factors };
  }
  const [a, b] = [above.atom, below.atom];
  // Complements: the two angles make a quarter turn.
  if (4n * (a.k * b.n + b.k * a.n) !== a.n * b.n) return { tangent: [], others: factors };
  const others = factors.filter((f) => f !== above && f !== below);
  const angle = partOfHalfTurn(b.k, b.n);
  if (angle.bottom % 4n !== 2n) return { tangent: [call('tan', angle)], others };
  return { tangent: [call('cot', partOfHalfTurn(a.k, a.n))], others };
}

/** A coefficient in front of names: sign apart, brackets around a sum, nothing for 1 unless it stands alone. */
function writeCoefficient(x: Cx, alone: boolean): (Name & { sign: '' | '-' }) | null {
  if (isRealCx(x) && isRationalEl(x.re)) {
    const n = BigInt(numerator(x.re));
    const size = n < 0n ? -n : n;
    const shown = size === 1n && !alone ? '' : `${size}`;
    return { sign: n < 0n ? '-' : '', text: shown, tex: shown };
  }
  const { text, tex, staged } = writeValue(x);
  if (staged) return null;
  if (isSumText(text)) return { sign: '', text: `(${text})`, tex: `\\left(${tex}\\right)` };
  return text.startsWith('-')
    ? { sign: '-', text: text.slice(1), tex: `${tex.slice(1)}\\,` }
    : { sign: '', text, tex: `${tex}\\,` };
}

function writeFactor({ atom, power }: Factor): Name {
  if (power === 1) return writeAtom(atom);
  if (atom.kind === 'written' && atom.root !== undefined && atom.root.index !== 3) {
    const { text, tex, index } = atom.root;
    return {
      text: `(${text})^(${power}/${index})`,
      tex: `\\left(${tex}\\right)^{${power}/${index}}`,
    };
  }
  const { text, tex } = writeAtom(atom);
  return { text: `${text}^${power}`, tex: `\\left(${tex}\\right)^{${power}}` };
}

function writeAtom(atom: Atom): Name {
  switch (atom.kind) {
    case 'written':
      return atom;
    case 'radical': {
      const { radicand: r, index: e } = atom;
      return {
        text: e === 2 ? `sqrt(${r})` : e === 3 ? `cbrt(${r})` : `${r}^(1/${e})`,
        tex: e === 2 ? `\\sqrt{${r}}` : `\\sqrt[${e}]{${r}}`,
      };
    }
    case 'cosine':
      return writeCosine(atom.k, atom.n);
  }
}

interface Angle {
  readonly top: bigint;
  readonly bottom: bigint;
}

/** k/n of a turn as a part of half a turn, in lowest terms. */
const partOfHalfTurn = (k: bigint, n: bigint): Angle =>
  n % 2n === 0n ? { top: k, bottom: n / 2n } : { top: 2n * k, bottom: n };

/** As a sine where the complement has half the parts. */
export function writeCosine(k: bigint, n: bigint): Name {
  const angle = partOfHalfTurn(k, n);
  if (angle.bottom % 4n !== 2n) return call('cos', angle);
  const half = angle.bottom / 2n;
  return call('sin', { top: (half - angle.top) / 2n, bottom: half });
}

function call(name: 'cos' | 'sin' | 'tan' | 'cot', { top, bottom }: Angle): Name {
  return {
    text: `${name}(${top === 1n ? '' : `${top}*`}pi/${bottom})`,
    tex: `\\${name}\\frac{${top === 1n ? '' : top}\\pi}{${bottom}}`,
  };
}
