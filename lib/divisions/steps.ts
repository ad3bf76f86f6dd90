import { carlyleCircle, type CarlyleCircle } from './carlyle';
import { factorise, leastInverse } from './numbers';
import { isFermatPrime, type FermatPrime } from './periods';
import { decideDivision } from './reach';
import { encloseCosine, rationalCosine } from './turn-value';

/** One step of dividing a circle that straightedge and compass can divide, in words and in formulas. */
export interface DivisionStep {
  /** How many equal parts can be stepped off once it is done. */
  parts: number;
  kind: 'diameter' | 'right-angle' | 'third' | 'chain' | 'combine' | 'opposite' | 'halve';
  words: string;
  tex: string;
  /** The chain that a step of kind `chain` works through. */
  prime?: FermatPrime;
  /** Circle of the step's own quadratic x² − (2 + 2cos θ) = 0, for kind `halve`. */
  circle?: CarlyleCircle;
}

const CIRCLE_DIGITS = 12;

/**
 * The steps that divide the circle into n parts, in order; null where straightedge and compass do not reach.
 * Method: the Fermat primes of n one by one through their chains, put together by Bézout's a/m + b/p = 1/(m·p) and
 * the addition theorem, then the points opposite, then half-angles. Accepts 1 ≤ n ≤ 10⁶.
 */
export function divisionSteps(n: number): DivisionStep[] | null {
  if (!decideDivision(BigInt(n)).compass) return null;
  const primes = factorise(n).flatMap(({ prime }) => (isFermatPrime(prime) ? [prime] : []));
  const steps: DivisionStep[] = [];
  let parts = 1;
  for (const prime of primes) {
    steps.push(primeStep(prime));
    if (parts > 1) steps.push(combineStep(parts, prime));
    parts *= prime;
  }
  for (; parts < n; parts *= 2) steps.push(doublingStep(parts));
  return steps;
}

function primeStep(prime: FermatPrime): DivisionStep {
  if (prime === 3) {
    return {
      parts: 3,
      kind: 'third',
      prime,
      words:
        'Three parts: the perpendicular through the middle of the radius that lies opposite the datum meets the circle in two of the three points.',
      tex: '\\cos\\tfrac{2\\pi}{3}=-\\tfrac12',
    };
  }
  const last = Math.log2(prime - 1) - 1;
  return {
    parts: prime,
    kind: 'chain',
    prime,
    words: `${prime} parts: work through the quadratics for ${prime} in their order. The last root, halved, is the cosine of one part.`,
    tex: `\\cos\\tfrac{2\\pi}{${prime}}=\\tfrac12\\,\\eta_{${last},0}`,
  };
}

function combineStep(m: number, p: number): DivisionStep {
  const a = leastInverse(p, m);
  const b = (1 - a * p) / m;
  const [plus, minus] = a > 0 ? [`${a}/${m}`, `${-b}/${p}`] : [`${b}/${p}`, `${-a}/${m}`];
  const [alpha, beta] = [plus, minus].map((text) => {
    const [over, under] = text.split('/') as [string, string];
    return `\\tfrac{${2 * Number(over)}\\pi}{${under}}`;
  }) as [string, string];
  const fraction = (text: string) => `\\tfrac{${text.replace('/', '}{')}}`;
  return {
    parts: m * p,
    kind: 'combine',
    words: `${m * p} parts: go ${plus} of a turn forwards from the datum and ${minus} back. What is left is 1/${m * p} of a turn.`,
    tex: `${fraction(`1/${m * p}`)}=${fraction(plus)}-${fraction(minus)},\\quad \\cos\\tfrac{2\\pi}{${m * p}}=\\cos${alpha}\\cos${beta}+\\sin${alpha}\\sin${beta}`,
  };
}

function doublingStep(parts: number): DivisionStep {
  const next = 2 * parts;
  if (parts === 1) {
    return {
      parts: 2,
      kind: 'diameter',
      words: 'Two parts: the diameter through the datum.',
      tex: '\\cos\\pi=-1',
    };
  }
  if (parts === 2) {
    return {
      parts: 4,
      kind: 'right-angle',
      words: 'Four parts: the diameter square to the first.',
      tex: '\\cos\\tfrac{\\pi}{2}=0',
    };
  }
  if (parts % 2 === 1) {
    return {
      parts: next,
      kind: 'opposite',
      words: `${next} parts: draw the diameter through each of the ${parts} points; its far ends halve the arcs.`,
      tex: `\\cos\\tfrac{2\\pi}{${next}}=-\\cos\\tfrac{${parts + 1}\\pi}{${parts}}`,
    };
  }
  return {
    parts: next,
    kind: 'halve',
    words: `${next} parts: halve each of the ${parts} arcs.`,
    tex: `\\cos\\tfrac{2\\pi}{${next}}=\\sqrt{\\tfrac12\\left(1+\\cos\\tfrac{2\\pi}{${parts}}\\right)}`,
    circle: halvingCircle(parts),
  };
}

/** Carlyle circle of x² − (2 + 2cos(2π/n)) = 0, whose positive root is 2cos(π/n). */
function halvingCircle(parts: number): CarlyleCircle {
  const n = BigInt(parts);
  const twice = encloseCosine(1n, n, { n: 2n, d: 1n });
  const error = rationalCosine(1n, n) === null ? 2n : 0n;
  return carlyleCircle((bits) => {
    const { low, high, scale } = twice(bits);
    const middle = (((low + high) / 2n) << BigInt(bits)) / scale;
    const product = -(middle + (2n << BigInt(bits)));
    return { sum: { value: 0n, error: 0n }, product: { value: product, error } };
  }, CIRCLE_DIGITS);
}
