/**
 * Lattice reduction on exact integers: the integral form of Lenstra, Lenstra & Lovász (1982) as in
 * Cohen, A Course in Computational Algebraic Number Theory, algorithm 2.6.7, without floating point.
 */
export type Row = bigint[];

const dot = (u: Row, v: Row): bigint => {
  let sum = 0n;
  for (let k = 0; k < u.length; k++) sum += (u[k] as bigint) * (v[k] as bigint);
  return sum;
};

/** Nearest integer to a/b for b > 0. */
function nearest(a: bigint, b: bigint): bigint {
  const twice = 2n * a + b;
  const q = twice / (2n * b);
  return twice < 0n && q * 2n * b !== twice ? q - 1n : q;
}

/**
 * Reduces linearly independent rows in place (δ = 3/4) and returns the Gram determinants d₀ = 1, d₁, …, d_n:
 * the squared length of the k-th Gram–Schmidt vector (k from 1) is d_k / d_{k−1}.
 * Cost: O(n⁴ log B) operations on integers of O(n log B) bits for rows of length up to B.
 */
export function reduceLattice(rows: Row[]): bigint[] {
  const n = rows.length;
  const d: bigint[] = new Array<bigint>(n + 1).fill(0n);
  d[0] = 1n;
  const lambda: bigint[][] = rows.map(() => new Array<bigint>(n).fill(0n));
  const L = (i: number, j: number): bigint => (lambda[i] as bigint[])[j] as bigint;
  const D = (k: number): bigint => d[k] as bigint;

  const orthogonalise = (k: number): void => {
    for (let j = 0; j <= k; j++) {
      let u = dot(rows[k] as Row, rows[j] as Row);
      for (let i = 0; i < j; i++) u = (D(i + 1) * u - L(k, i) * L(j, i)) / D(i);
      if (j < k) (lambda[k] as bigint[])[j] = u;
      else d[k + 1] = u;
    }
    if (d[k + 1] === 0n) throw new RangeError('the rows are linearly dependent');
  };

  const sizeReduce = (k: number, l: number): void => {
    const doubled = 2n * L(k, l);
    if ((doubled < 0n ? -doubled : doubled) <= D(l + 1)) return;
    const q = nearest(L(k, l), D(l + 1));
    const target = rows[k] as Row;
    const source = rows[l] as Row;
    for (let c = 0; c < target.length; c++) {
      target[c] = (target[c] as bigint) - q * (source[c] as bigint);
    }
    const lk = lambda[k] as bigint[];
    lk[l] = L(k, l) - q * D(l + 1);
    for (let i = 0; i < l; i++) lk[i] = L(k, i) - q * L(l, i);
  };

  const swap = (k: number, known: number): void => {
    [rows[k], rows[k - 1]] = [rows[k - 1] as Row, rows[k] as Row];
    const lk = lambda[k] as bigint[];
    const lp = lambda[k - 1] as bigint[];
    for (let j = 0; j < k - 1; j++) [lk[j], lp[j]] = [lp[j] as bigint, lk[j] as bigint];
    const l = L(k, k - 1);
    const b = (D(k - 1) * D(k + 1) + l * l) / D(k);
    for (let i = k + 1; i <= known; i++) {
      const li = lambda[i] as bigint[];
      const t = L(i, k);
      li[k] = (D(k + 1) * L(i, k - 1) - l * t) / D(k);
      li[k - 1] = (b * t + l * (li[k] as bigint)) / D(k + 1);
    }
    d[k] = b;
  };

  let known = 0;
  if (n > 0) orthogonalise(0);
  let k = 1;
  while (k < n) {
    if (k > known) {
      known = k;
      orthogonalise(k);
    }
    sizeReduce(k, k - 1);
    const l = L(k, k - 1);
    if (4n * D(k + 1) * D(k - 1) < 3n * D(k) * D(k) - 4n * l * l) {
      swap(k, known);
      k = Math.max(1, k - 1);
    } else {
      for (let j = k - 2; j >= 0; j--) sizeReduce(k, j);
      k++;
    }
  }
  return d;
}
