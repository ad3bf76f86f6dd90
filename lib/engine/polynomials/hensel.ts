/**
 * Lifting a factorisation from a prime to a power of it (Hensel; quadratic lifting on a balanced tree of
 * factors after von zur Gathen & Gerhard, Modern Computer Algebra, §15.4 and §15.5).
 */
import {
  addPoly,
  leadingOf,
  multiplyPoly,
  subtractPoly,
  trim,
  type IntegerPoly,
} from './integer-poly';
import { bezoutMod, multiplyMod, type ModPoly } from './mod-poly';

interface Leaf {
  poly: IntegerPoly;
  left: null;
}
interface Node {
  poly: IntegerPoly;
  left: Tree;
  right: Tree;
  s: IntegerPoly;
  t: IntegerPoly;
}
type Tree = Leaf | Node;

/** Residues −m/2 < c ≤ m/2. */
export function symmetricMod(f: IntegerPoly, m: bigint): IntegerPoly {
  const half = m / 2n;
  return trim(
    f.map((c) => {
      let r = c % m;
      if (r < 0n) r += m;
      return r > half ? r - m : r;
    }),
  );
}

/** Remainder and quotient by a monic divisor, coefficients modulo m. */
export function divideByMonic(
  f: IntegerPoly,
  g: IntegerPoly,
  m: bigint,
): { quotient: IntegerPoly; rest: IntegerPoly } {
  const rest = [...f];
  const quotient = new Array<bigint>(Math.max(0, f.length - g.length + 1)).fill(0n);
  for (let k = quotient.length - 1; k >= 0; k--) {
    const q = (rest[k + g.length - 1] as bigint) % m;
    if (q === 0n) continue;
    quotient[k] = q;
    for (let j = 0; j < g.length; j++) rest[k + j] = (rest[k + j] as bigint) - q * (g[j] as bigint);
  }
  return { quotient: symmetricMod(quotient, m), rest: symmetricMod(rest, m) };
}

const widen = (f: ModPoly, p: number): IntegerPoly => symmetricMod(f.map(BigInt), BigInt(p));

function treeOf(factors: readonly ModPoly[], p: number): { tree: Tree; product: ModPoly } {
  if (factors.length === 1) {
    const only = factors[0] as ModPoly;
    return { tree: { poly: widen(only, p), left: null }, product: only };
  }
  const middle = factors.length >> 1;
  const left = treeOf(factors.slice(0, middle), p);
  const right = treeOf(factors.slice(middle), p);
  const { s, t } = bezoutMod(left.product, right.product, p);
  const product = multiplyMod(left.product, right.product, p);
  return {
    tree: {
      poly: widen(product, p),
      left: left.tree,
      right: right.tree,
      s: widen(s, p),
      t: widen(t, p),
    },
    product,
  };
}

/** One step from m to m²: every node is corrected against its parent, cofactors included. */
function liftStep(tree: Tree, target: IntegerPoly, m: bigint): Tree {
  if (tree.left === null) return { poly: target, left: null };
  const square = m * m;
  const g = tree.left.poly;
  const h = tree.right.poly;
  const error = symmetricMod(subtractPoly(target, multiplyPoly(g, h)), square);
  const se = multiplyPoly(tree.s, error);
  const { quotient, rest } = divideByMonic(symmetricMod(se, square), h, square);
  const g2 = symmetricMod(
    addPoly(g, addPoly(multiplyPoly(tree.t, error), multiplyPoly(quotient, g))),
    square,
  );
  const h2 = symmetricMod(addPoly(h, rest), square);
  const b = symmetricMod(
    subtractPoly(addPoly(multiplyPoly(tree.s, g2), multiplyPoly(tree.t, h2)), [1n]),
    square,
  );
  const sb = divideByMonic(symmetricMod(multiplyPoly(tree.s, b), square), h2, square);
  const s2 = symmetricMod(subtractPoly(tree.s, sb.rest), square);
  const t2 = symmetricMod(
    subtractPoly(tree.t, addPoly(multiplyPoly(tree.t, b), multiplyPoly(sb.quotient, g2))),
    square,
  );
  return {
    poly: target,
    left: liftStep(tree.left, g2, m),
    right: liftStep(tree.right, h2, m),
    s: s2,
    t: t2,
  };
}

function leavesOf(tree: Tree): IntegerPoly[] {
  return tree.left === null ? [tree.poly] : [...leavesOf(tree.left), ...leavesOf(tree.right)];
}

/** Inverse of a modulo m for coprime a. Extended Euclid on integers. */
export function inverseBig(a: bigint, m: bigint): bigint {
  let [r0, r1] = [m, ((a % m) + m) % m];
  let [t0, t1] = [0n, 1n];
  while (r1 !== 0n) {
    const q = r0 / r1;
    [r0, r1] = [r1, r0 - q * r1];
    [t0, t1] = [t1, t0 - q * t1];
  }
  if (r0 !== 1n) throw new RangeError('the number has no inverse to this modulus');
  return ((t0 % m) + m) % m;
}

/**
 * Monic factors g₁, …, g_r modulo m = p^(2^k) ≥ `bound` with f ≡ lc(f)·g₁⋯g_r (mod m).
 * Needs: f squarefree modulo p, its leading coefficient not divisible by p, `factors` its monic factors there.
 * Cost: the last step dominates, about four products of the size of f per level of the tree.
 */
export function liftFactors(
  f: IntegerPoly,
  factors: readonly ModPoly[],
  p: number,
  bound: bigint,
): { factors: IntegerPoly[]; modulus: bigint } {
  let modulus = BigInt(p);
  let { tree } = treeOf(factors, p);
  while (modulus < bound) {
    const square = modulus * modulus;
    const scale = inverseBig(leadingOf(f), square);
    const target = symmetricMod(
      f.map((c) => c * scale),
      square,
    );
    tree = liftStep(tree, target, modulus);
    modulus = square;
  }
  return { factors: leavesOf(tree), modulus };
}
