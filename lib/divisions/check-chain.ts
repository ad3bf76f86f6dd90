import type { Chain, Combination } from './chain';
import {
  lastLevel,
  periodValues,
  powersOfRoot,
  siblingProduct,
  type FermatPrime,
  type PeriodValues,
} from './periods';

/** What was checked of a chain. All of it held, or `checkChain` threw. */
export interface ChainCheck {
  quadratics: number;
  /** Products of siblings multiplied out over Z[x]/(xᵖ − 1), one for each level. */
  exactProducts: number;
  /** Both roots satisfy every quadratic to within 10^−digits. */
  digits: number;
}

/**
 * Checks a chain by two routes that it was not made by.
 * Exactly: at each level the product of the siblings below η(k, 0) is multiplied out as polynomials in ζ and compared
 * with its combination of periods; x ↦ x^(g^j) carries the identity to every j. In numbers: both roots of every
 * quadratic, from cosines in fixed point, leave less than 10^−digits when put in.
 * Yields between slices of the work. Fails with a plain error, which would be a fault of ours. Cost for 65537 and 1 000
 * digits: about two seconds.
 */
export function* checkChain(chain: Chain, digits: number): Generator<void, ChainCheck, void> {
  const last = lastLevel(chain.prime);
  for (let k = 0; k < last; k++) {
    if (!isProductExact(chain.prime, k)) throw new Error(`The product of level ${k} is wrong.`);
    yield;
  }
  // 64 bits more than the digits: periods of 2^16 terms and coefficients below 2^15 use up less than 50 of them.
  const bits = Math.ceil(digits * Math.log2(10)) + 64;
  const values = yield* periodValues(chain.prime, bits);
  const one = 1n << BigInt(bits);
  const tolerance = (one * one) / 10n ** BigInt(digits);
  for (const { sum, product, larger, smaller } of chain.quadratics) {
    const s = valueOf(sum, values);
    const scaledProduct = valueOf(product, values) << BigInt(bits);
    for (const root of [larger, smaller]) {
      const x = values.of(root);
      const left = (x - s) * x + scaledProduct;
      if (left > tolerance || -left > tolerance) {
        throw new Error(
          `The period (${root.level}, ${root.index}) does not satisfy its quadratic.`,
        );
      }
    }
    yield;
  }
  return { quadratics: chain.quadratics.length, exactProducts: last, digits };
}

/** A combination in the units of the periods' values. */
export function valueOf({ constant, terms }: Combination, values: PeriodValues): bigint {
  return terms.reduce(
    (sum, term) => sum + BigInt(term.coefficient) * values.of(term),
    BigInt(constant) << BigInt(values.bits),
  );
}

/**
 * Whether η(k+1, 0)·η(k+1, 2^k) is what `siblingProduct` says, as an identity of polynomials modulo xᵖ − 1.
 * Method: Kronecker substitution; each coefficient of the product is at most (p−1)/2 ≤ 2^15 and has 16 bits for itself.
 */
export function isProductExact(p: FermatPrime, k: number): boolean {
  const powers = powersOfRoot(p);
  const indicator = (start: number, step: number) => {
    const set = new Uint32Array(p);
    for (let i = start; i < p - 1; i += step) set[powers[i] as number] = 1;
    return set;
  };
  const step = 2 ** (k + 1);
  const found = multiply(indicator(0, step), indicator(step / 2, step));
  const { constant, coefficients } = siblingProduct(p, k);
  const expected = new Uint32Array(p);
  expected[0] = constant;
  powers.forEach((x, i) => (expected[x] = coefficients[i % coefficients.length] as number));
  return found.every((coefficient, exponent) => coefficient === expected[exponent]);
}

/** Product modulo x^length − 1. */
function multiply(a: Uint32Array, b: Uint32Array): Uint32Array {
  const length = a.length;
  const digits = (packed(a) * packed(b)).toString(16).padStart(8 * length, '0');
  const product = new Uint32Array(length);
  for (let i = 0; i < 2 * length; i++) {
    const end = digits.length - 4 * i;
    const coefficient = parseInt(digits.slice(end - 4, end), 16);
    product[i % length] = (product[i % length] as number) + coefficient;
  }
  return product;
}

function packed(coefficients: Uint32Array): bigint {
  const digits = Array.from(coefficients, (c) => c.toString(16).padStart(4, '0'));
  return BigInt(`0x${digits.reverse().join('')}`);
}
