/** The named numbers that sums beyond square roots are written with, and their fixed order. */
import { bigGcd } from '../integers';
import type { NamedSum } from './named-sum';
import { wholeRoot } from './whole-root';

/** The positive root of an integer above 1 without a factor that is a power of the index. */
export interface Radical {
  readonly kind: 'radical';
  readonly radicand: bigint;
  readonly index: number;
}

/** cos of k/n of a turn in lowest terms, 0 < k/n < 1/2, of a division that square roots do not reach. */
export interface Cosine {
  readonly kind: 'cosine';
  readonly k: bigint;
  readonly n: bigint;
}

/** Anything else by its text, which parses back to it: the same text is the same number. */
export interface WrittenName {
  readonly kind: 'written';
  readonly text: string;
  readonly tex: string;
  readonly isReal: boolean;
  /** Set where the text is the principal root of this index of another sum, given with its own text. */
  readonly root?: {
    readonly text: string;
    readonly tex: string;
    readonly index: number;
    readonly radicand: NamedSum;
  };
}

export type Atom = Radical | Cosine | WrittenName;

export interface Factor {
  readonly atom: Atom;
  /** Not 0; 1 for a radical. */
  readonly power: number;
}

/** Primes whose e-th powers are taken out from under a written root. */
const PULLED = [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n];

/** n = outside^e · inside for n > 0, as far as small primes and whole roots go. */
export function pullOut(n: bigint, index: number): { outside: bigint; inside: bigint } {
  const power = BigInt(index);
  let [outside, inside] = [1n, n];
  for (const p of PULLED) {
    while (inside % p ** power === 0n) {
      inside /= p ** power;
      outside *= p;
    }
  }
  const whole = wholeRoot(inside, index);
  return whole ** power === inside ? { outside: outside * whole, inside: 1n } : { outside, inside };
}

/**
 * cos of any k/n of a turn as ± the cosine of an angle between 0 and half a turn. Where the angle is the complement of
 * one with half the parts (and so written as a sine) it is brought below a quarter turn.
 */
export function normalAngle(k: bigint, n: bigint): { sign: bigint; k: bigint; n: bigint } {
  const g = bigGcd(k < 0n ? -k : k, n);
  const parts = n / g;
  let part = (((k / g) % parts) + parts) % parts;
  if (2n * part > parts) part = parts - part;
  const isSine = parts % 8n === 4n;
  if (isSine && 4n * part > parts) return { sign: -1n, k: parts / 2n - part, n: parts };
  return { sign: 1n, k: part, n: parts };
}

export const isSameAtom = (a: Atom, b: Atom): boolean => compareAtoms(a, b) === 0;

const KINDS: readonly Atom['kind'][] = ['radical', 'written', 'cosine'];

const order = <T extends bigint | number | string>(a: T, b: T): number =>
  a < b ? -1 : a > b ? 1 : 0;

function compareAtoms(a: Atom, b: Atom): number {
  if (a.kind === 'radical' && b.kind === 'radical') {
    return order(a.index, b.index) || order(a.radicand, b.radicand);
  }
  if (a.kind === 'cosine' && b.kind === 'cosine') return order(a.n, b.n) || order(a.k, b.k);
  if (a.kind === 'written' && b.kind === 'written') return order(a.text, b.text);
  return order(KINDS.indexOf(a.kind), KINDS.indexOf(b.kind));
}

/** Products with fewer factors first, then factor by factor. */
export function compareFactors(a: readonly Factor[], b: readonly Factor[]): number {
  if (a.length !== b.length) return order(a.length, b.length);
  for (let k = 0; k < a.length; k++) {
    const [x, y] = [a[k] as Factor, b[k] as Factor];
    const found = compareAtoms(x.atom, y.atom) || order(x.power, y.power);
    if (found !== 0) return found;
  }
  return 0;
}
