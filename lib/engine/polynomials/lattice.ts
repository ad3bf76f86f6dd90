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

/** Integral Gram–Schmidt data of growing rows: λ and the Gram determinants d, kept up to date by the steps. */
class GramSchmidt {
  readonly d: bigint[] = [1n];
  private readonly lambda: bigint[][] = [];

  constructor(private readonly rows: Row[]) {}

  get known(): number {
    return this.lambda.length;
  }

  determinant(k: number): bigint {
    return this.d[k] as bigint;
  }

  coefficient(i: number, j: number): bigint {
    return (this.lambda[i] as bigint[])[j] as bigint;
  }

  /** Takes the next row in. */
  extend(): void {
    const k = this.known;
    const own: bigint[] = [];
    this.lambda.push(own);
    for (let j = 0; j <= k; j++) {
      let u = dot(this.rows[k] as Row, this.rows[j] as Row);
      for (let i = 0; i < j; i++) {
        u =
          (this.determinant(i + 1) * u - (own[i] as bigint) * this.coefficient(j, i)) /
          this.determinant(i);
      }
      // The last entry stands for d[k+1] and is not used as a coefficient.
      own.push(u);
      if (j === k) this.d[k + 1] = u;
    }
    if (this.d[k + 1] === 0n) throw new RangeError('the rows are linearly dependent');
  }

  /** Subtracts the nearest multiple of row l from row k > l. */
  sizeReduce(k: number, l: number): void {
    const doubled = 2n * this.coefficient(k, l);
    if ((doubled < 0n ? -doubled : doubled) <= this.determinant(l + 1)) return;
    const q = nearest(this.coefficient(k, l), this.determinant(l + 1));
    const target = this.rows[k] as Row;
    const source = this.rows[l] as Row;
    for (let c = 0; c < target.length; c++) {
      target[c] = (target[c] as bigint) - q * (source[c] as bigint);
    }
    const own = this.lambda[k] as bigint[];
    own[l] = this.coefficient(k, l) - q * this.determinant(l + 1);
    for (let i = 0; i < l; i++) own[i] = this.coefficient(k, i) - q * this.coefficient(l, i);
  }

  /** Exchanges rows k−1 and k. */
  swap(k: number): void {
    const { rows, d } = this;
    [rows[k], rows[k - 1]] = [rows[k - 1] as Row, rows[k] as Row];
    const own = this.lambda[k] as bigint[];
    const previous = this.lambda[k - 1] as bigint[];
    for (let j = 0; j < k - 1; j++) {
      [own[j], previous[j]] = [previous[j] as bigint, own[j] as bigint];
    }
    const l = this.coefficient(k, k - 1);
    const [before, at, after] = [
      this.determinant(k - 1),
      this.determinant(k),
      this.determinant(k + 1),
    ];
    const b = (before * after + l * l) / at;
    for (let i = k + 1; i < this.known; i++) {
      const row = this.lambda[i] as bigint[];
      const t = this.coefficient(i, k);
      row[k] = (after * this.coefficient(i, k - 1) - l * t) / at;
      row[k - 1] = (b * t + l * row[k]) / after;
    }
    d[k] = b;
  }
}

/**
 * Reduces linearly independent rows in place (δ = 3/4) and returns the Gram determinants d₀ = 1, d₁, …, d_n:
 * the squared length of the k-th Gram–Schmidt vector (k from 1) is d_k / d_{k−1}.
 * Cost: O(n⁴ log B) operations on integers of O(n log B) bits for rows of length up to B.
 */
export function reduceLattice(rows: Row[]): bigint[] {
  const data = new GramSchmidt(rows);
  if (rows.length > 0) data.extend();
  let k = 1;
  while (k < rows.length) {
    if (k >= data.known) data.extend();
    data.sizeReduce(k, k - 1);
    const l = data.coefficient(k, k - 1);
    const d = data.determinant(k);
    if (4n * data.determinant(k + 1) * data.determinant(k - 1) < 3n * d * d - 4n * l * l) {
      data.swap(k);
      k = Math.max(1, k - 1);
    } else {
      for (let j = k - 2; j >= 0; j--) data.sizeReduce(k, j);
      k++;
    }
  }
  return data.d;
}
