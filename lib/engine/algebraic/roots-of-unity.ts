/** Recognising roots of unity by their minimal polynomial, the cyclotomic one (Gauss 1801). */
import { cyclotomicPolynomial, totient } from '../cosine-polynomial';
import type { Enclosure } from '../enclosure';
import type { Budget } from '../limits';
import { isEqual, type IntegerPoly } from '../polynomials/integer-poly';
import { encloseCosine } from './cosine';

/** All n with φ(n) = degree; φ(n) ≥ √(n/2) bounds them. */
function ordersOf(degree: number): bigint[] {
  const orders: bigint[] = [];
  for (let n = 1n; n <= 2n * BigInt(degree * degree) + 2n; n++) {
    if (totient(n) === BigInt(degree)) orders.push(n);
  }
  return orders;
}

/** The degrees looked at: divisions of a turn into some hundreds of parts at the most. */
const LARGEST_DEGREE = 64;

/**
 * k and n with 0 ≤ k < n, in lowest terms, when a number with this minimal polynomial is e^(2πik/n); null when it is no
 * root of unity. `re` encloses its real part, `isBelow` says whether its imaginary part is negative, and is asked only of a root of unity.
 * Cost: log n enclosures of a cosine.
 */
export function partOfTurn(
  poly: IntegerPoly,
  re: (P: number) => Enclosure,
  isBelow: () => boolean,
  budget: Budget,
): { k: bigint; n: bigint } | null {
  const degree = poly.length - 1;
  if (degree > LARGEST_DEGREE || (poly[0] !== 1n && degree > 1)) return null;
  const n = ordersOf(degree).find((order) => isEqual(cyclotomicPolynomial(order).reverse(), poly));
  if (n === undefined) return null;
  if (n <= 2n) return { k: n - 1n, n };
  // The real part is cos(2πk/n) for one k < n/2 prime to n, and cosines fall as k grows.
  let [low, high] = [0n, n / 2n];
  for (let P = 64; low < high;) {
    const middle = (low + high + 1n) / 2n;
    const [x, c] = [re(P), encloseCosine(2n * middle - 1n, 2n * n, P, budget)];
    if (x.low > c.high) high = middle - 1n;
    else if (x.high < c.low) low = middle;
    else P *= 2;
  }
  return { k: isBelow() ? n - low : low, n };
}
