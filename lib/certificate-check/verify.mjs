/**
 * Checks certificates of exact numbers. Uses Node's built-ins only and shares no code with the engine that writes them.
 *
 *   npm run -s verify-certificate -- file.json      (or the certificate on standard input)
 *
 * What is checked: each radicand is a non-square in the field of the roots before it, so that the products of the roots are a
 * basis; each enclosure holds the positive root, and those of the value follow; the polynomial is primitive and vanishes at the
 * value exactly; no polynomial of lower degree does.
 */

import { readFileSync } from 'node:fs';
import { pathToFileURL } from 'node:url';

class Refused extends Error {}

function must(condition, reason) {
  if (!condition) throw new Refused(reason);
}

const integer = (s, what) => {
  must(
    typeof s === 'string' && /^-?\d+$/.test(s) && s.length < 200_000,
    `${what} is not an integer`,
  );
  return BigInt(s);
};

/** Reads an element as { den, terms: Map(mask → integer) }; only the first `count` roots may occur. */
function readElement(e, count, what) {
  must(e && Array.isArray(e.terms), `${what} is not an element`);
  const den = integer(e.denominator, `the denominator of ${what}`);
  must(den > 0n, `the denominator of ${what} is not positive`);
  const terms = new Map();
  for (const [set, c] of e.terms) {
    let mask = 0;
    for (const i of set) {
      must(
        Number.isInteger(i) && i >= 0 && i < count && !(mask & (1 << i)),
        `${what} names a root out of place`,
      );
      mask |= 1 << i;
    }
    must(!terms.has(mask), `${what} has a term twice`);
    terms.set(mask, integer(c, `a coefficient of ${what}`));
  }
  return { den, terms };
}

const mod = (a, p) => ((a % p) + p) % p;

function power(base, exponent, p) {
  let result = 1n;
  for (let b = mod(base, p), e = exponent; e > 0n; e >>= 1n) {
    if (e & 1n) result = (result * b) % p;
    b = (b * b) % p;
  }
  return result;
}

/** Trial division up to 10^12, beyond that Miller–Rabin to the first twelve prime bases (a proof below 3·10^24). */
function isPrime(n) {
  if (n < 2n) return false;
  for (let q = 2n; q < 1000n; q++) if (n % q === 0n) return n === q;
  if (n < 1_000_000n) return true;
  let d = n - 1n;
  let s = 0;
  while (d % 2n === 0n) {
    d /= 2n;
    s++;
  }
  return [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n].every((a) => {
    let x = power(a, d, n);
    if (x === 1n || x === n - 1n) return true;
    for (let i = 1; i < s; i++) {
      x = (x * x) % n;
      if (x === n - 1n) return true;
    }
    return false;
  });
}

/** Integer radicands: squarefree products of primes, independent over GF(2). */
function checkIntegerRoots(roots) {
  const place = new Map();
  const rows = [];
  for (const { radicand, witness, name } of roots) {
    let product = 1n;
    let row = 0n;
    for (const s of witness.factors) {
      const p = integer(s, `a factor of ${name}`);
      must(isPrime(p), `a factor of the radicand of ${name} is not prime`);
      if (!place.has(p)) place.set(p, 1n << BigInt(place.size));
      must(!(row & place.get(p)), `the radicand of ${name} is not squarefree`);
      row |= place.get(p);
      product *= p;
    }
    const value = radicand.terms.get(0);
    must(
      radicand.den === 1n && radicand.terms.size === 1 && value === product,
      `the factors of ${name} do not multiply to its radicand`,
    );
    for (const r of rows) if ((row ^ r) < row) row ^= r;
    must(row !== 0n, `${name} depends on the roots before it`);
    rows.push(row);
  }
}

/** A nested radicand: a non-residue under residues of the roots before it, none of them 0. */
function checkResidues(roots, index) {
  const { witness, radicand, name } = roots[index];
  const p = BigInt(witness.prime);
  must(p > 2n && p < 2n ** 40n && isPrime(p), `the witness prime of ${name} is not a prime`);
  must(
    Array.isArray(witness.residues) && witness.residues.length === index,
    `${name} has a witness of the wrong length`,
  );
  const residues = witness.residues.map(BigInt);
  const image = (e) => {
    let sum = 0n;
    for (const [mask, c] of e.terms) {
      let term = mod(c, p);
      for (let i = 0; i < index; i++) if (mask & (1 << i)) term = (term * residues[i]) % p;
      sum += term;
    }
    must(mod(e.den, p) !== 0n, `the witness prime of ${name} divides a denominator`);
    return (mod(sum, p) * power(e.den, p - 2n, p)) % p;
  };
  residues.forEach((r, i) => {
    must(
      mod(r, p) !== 0n && (r * r) % p === image(roots[i].radicand),
      `a residue in the witness of ${name} is no root`,
    );
  });
  must(
    power(image(radicand), (p - 1n) / 2n, p) === p - 1n,
    `the radicand of ${name} is not a non-residue`,
  );
}

const floorDiv = (n, d) => {
  const q = n / d;
  return n < 0n && q * d !== n ? q - 1n : q;
};

function interval(e, enclosures, bits) {
  let low = 0n;
  let high = 0n;
  for (const [mask, c] of e.terms) {
    let a = c;
    let b = c;
    let count = 0n;
    enclosures.forEach((r, i) => {
      if (!(mask & (1 << i))) return;
      a *= c < 0n ? r.high : r.low;
      b *= c < 0n ? r.low : r.high;
      count++;
    });
    low += count === 0n ? a << bits : a >> (bits * (count - 1n));
    high += count === 0n ? b << bits : -(-b >> (bits * (count - 1n)));
  }
  return { low: floorDiv(low, e.den), high: -floorDiv(-high, e.den) };
}

function readEnclosure(e, what) {
  must(
    e && Number.isInteger(e.bits) && e.bits > 0 && e.bits <= 200_000,
    `the enclosure of ${what} has no precision`,
  );
  return { low: integer(e.low, what), high: integer(e.high, what), bits: BigInt(e.bits) };
}

/** Multiplication by x as a matrix over the basis of products, i on top when x is not real; entries over `den`. */
function matrixOf(roots, re, im) {
  const k = roots.length;
  const den = re.den * im.den;
  const list = (e, size) =>
    Array.from({ length: size }, (_, m) => (e.terms.get(m) ?? 0n) * (den / e.den));
  const build = (c, level) => {
    if (level === 0) return [c];
    const half = c.length / 2;
    const a = build(c.slice(0, half), level - 1);
    const b = build(c.slice(half), level - 1);
    // The radicand of the top root as a vector; level k+1 is i, with radicand −1.
    const d = level > k ? unit(half, -1n) : vector(roots[level - 1].radicand, half);
    const db = multiply(b, d.c).map((v) => {
      must(v % d.den === 0n, 'a radicand is not integral');
      return v / d.den;
    });
    const top = build(db, level - 1);
    return [...a.map((row, i) => [...row, ...top[i]]), ...b.map((row, i) => [...row, ...a[i]])];
  };
  const unit = (n, v) => ({ den: 1n, c: Array.from({ length: n }, (_, i) => (i === 0 ? v : 0n)) });
  const vector = (e, n) => ({
    den: e.den,
    c: Array.from({ length: n }, (_, m) => e.terms.get(m) ?? 0n),
  });
  const size = 2 ** k;
  const real = im.terms.size === 0;
  return {
    den,
    matrix: real ? build(list(re, size), k) : build([...list(re, size), ...list(im, size)], k + 1),
  };
}

function multiply(matrix, v) {
  return matrix.map((row) => {
    let sum = 0n;
    for (let i = 0; i < row.length; i++) if (v[i] !== 0n && row[i] !== 0n) sum += row[i] * v[i];
    return sum;
  });
}

function checkPolynomial(poly, { den, matrix }) {
  const n = poly.length - 1;
  const size = matrix.length;
  let gcd = 0n;
  for (const c of poly) for (let a = c < 0n ? -c : c; a !== 0n;) [gcd, a] = [a, gcd % a];
  must(
    poly[0] > 0n && (gcd === 1n || gcd === -1n),
    'the polynomial is not primitive with a positive leading coefficient',
  );
  // Horner's rule for den^n·f(x), with y = den·x an integer matrix.
  let v = new Array(size).fill(0n);
  let scale = 1n;
  for (const c of poly) {
    v = multiply(matrix, v);
    v[0] += c * scale;
    scale *= den;
  }
  must(
    v.every((c) => c === 0n),
    'the polynomial does not vanish at the value',
  );
  // 1, y, …, y^(n−1) are independent modulo a prime, so no polynomial of lower degree vanishes.
  must(
    [2147483647n, 2147483629n, 2147483587n].some((p) => independent(matrix, n, p)),
    'a polynomial of lower degree may vanish',
  );
}

function independent(matrix, n, p) {
  const m = matrix.map((row) => row.map((c) => mod(c, p)));
  const pivots = [];
  let v = m.map((_, i) => (i === 0 ? 1n : 0n));
  for (let j = 0; j < n; j++) {
    const r = v.slice();
    for (const { at, row } of pivots) {
      const f = r[at];
      if (f !== 0n)
        for (let i = 0; i < r.length; i++) if (row[i] !== 0n) r[i] = mod(r[i] - f * row[i], p);
    }
    const at = r.findIndex((c) => c !== 0n);
    if (at < 0) return false;
    const inverse = power(r[at], p - 2n, p);
    pivots.push({ at, row: r.map((c) => (c * inverse) % p) });
    v = multiply(m, v).map((c) => c % p);
  }
  return true;
}

/** Checks a certificate; returns null when all holds, else what does not. */
export function refusal(certificate) {
  try {
    check(certificate);
    return null;
  } catch (error) {
    if (error instanceof Refused) return error.message;
    return `the certificate cannot be read (${error.message})`;
  }
}

function check(c) {
  must(
    c && c.format === 'surdwork-certificate' && c.version === 1,
    'this is not a certificate of version 1',
  );
  must(Array.isArray(c.roots) && c.roots.length <= 16, 'there is no list of at most 16 roots');
  const roots = c.roots.map((r, i) => ({
    name: r.name,
    witness: r.witness,
    radicand: readElement(r.radicand, i, `the radicand of ${r.name}`),
  }));
  const plain = roots.filter((r) => r.witness?.factors);
  must(
    plain.every((r, i) => roots[i] === r),
    'roots of integers do not come first',
  );
  checkIntegerRoots(plain);
  roots.forEach((r, i) => {
    if (!r.witness?.factors) checkResidues(roots, i);
  });
  const enclosures = [];
  c.roots.forEach((r, i) => {
    const e = readEnclosure(r.enclosure, r.name);
    must(i === 0 || e.bits === enclosures[0].bits, 'the enclosures differ in precision');
    const d = interval(roots[i].radicand, enclosures, e.bits);
    must(d.low > 0n, `the radicand of ${r.name} is not seen to be positive`);
    must(
      e.low > 0n && e.low * e.low <= d.low << e.bits && d.high << e.bits <= e.high * e.high,
      `the enclosure of ${r.name} does not hold its root`,
    );
    enclosures.push(e);
  });
  const re = readElement(c.value?.re, roots.length, 'the real part');
  const im = readElement(c.value?.im, roots.length, 'the imaginary part');
  for (const [part, e] of [
    ['re', re],
    ['im', im],
  ]) {
    const claimed = readEnclosure(c.enclosure?.[part], part);
    must(
      enclosures.length === 0 || claimed.bits === enclosures[0].bits,
      'the enclosures differ in precision',
    );
    const found = interval(e, enclosures, claimed.bits);
    must(
      claimed.low <= found.low && found.high <= claimed.high,
      `the enclosure of the ${part} part does not hold it`,
    );
    const straddles = claimed.low < 0n && claimed.high > 0n;
    must(!straddles, `the enclosure of the ${part} part does not fix its sign`);
  }
  must(
    Array.isArray(c.minimalPolynomial) && c.minimalPolynomial.length === c.degree + 1,
    'degree and polynomial do not agree',
  );
  must(c.degree >= 1 && c.degree <= 1024, 'the degree is out of range');
  checkPolynomial(
    c.minimalPolynomial.map((s) => integer(s, 'a coefficient')),
    matrixOf(roots, re, im),
  );
}

const { argv, stdout } = process;
if (argv[1] && import.meta.url === pathToFileURL(argv[1]).href) {
  let reason;
  try {
    reason = refusal(JSON.parse(readFileSync(argv[2] ?? 0, 'utf8')));
  } catch (error) {
    reason = `there is no JSON to read (${error.message})`;
  }
  stdout.write(reason === null ? 'accepted\n' : `refused: ${reason}\n`);
  process.exitCode = reason === null ? 0 : 1;
}
