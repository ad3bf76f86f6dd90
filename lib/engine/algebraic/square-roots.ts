/**
 * A number beyond the tower brought back into it: its quadratic chain solved from the bottom up with the exact
 * arithmetic of the tower, each time taking the root that the number's own box names.
 */
import { addCx, inverseCx, mulCx, negCx, real, sqrtCx } from '../complex';
import { rationalEl, scaleEl } from '../element';
import { enclose } from '../enclosure';
import * as Z from '../int';
import type { Cx } from '../complex';
import type { Field } from '../tower';
import { derivativeOf, type IntegerPoly } from '../polynomials/integer-poly';
import type { Integral } from '../subfields/integral';
import type { Subfield } from '../subfields/subfield';
import type { Algebraic } from './algebraic';
import { areApart, type Box } from './box';
import { integralBox, lowerBox, type BoxAt } from './lower-box';
import { fraction } from './operations';

const cxBox = (x: Cx, P: number): Box => ({ re: enclose(x.re, P), im: enclose(x.im, P) });

function rationalCx(field: Field, n: bigint, d: bigint): Cx {
  const { n: top, d: bottom } = fraction(n, d);
  return real(rationalEl(field, Z.small(top), Z.small(bottom)));
}

const scaleCx = (x: Cx, n: bigint, d: bigint): Cx => {
  const { n: top, d: bottom } = fraction(n, d);
  return {
    re: scaleEl(x.re, Z.small(top), Z.small(bottom)),
    im: scaleEl(x.im, Z.small(top), Z.small(bottom)),
  };
};

/** Σ c_k θ^k in the tower. */
function combineCx(field: Field, c: IntegerPoly, theta: Cx): Cx {
  let value = rationalCx(field, 0n, 1n);
  for (let k = c.length - 1; k >= 0; k--) {
    value = addCx(mulCx(value, theta), rationalCx(field, c[k] as bigint, 1n));
  }
  return value;
}

/** Of two values the one that the boxes close in on. */
function chosen(a: Cx, b: Cx, box: BoxAt): Cx {
  for (let P = 64; ; P *= 2) {
    const target = box(P);
    if (target === null) continue;
    if (areApart(cxBox(b, P), target)) return a;
    if (areApart(cxBox(a, P), target)) return b;
  }
}

function solve(field: Field, steps: readonly Subfield[], box: BoxAt): Cx {
  const [step, ...below] = steps;
  // The generator of the rationals that a chain ends in is centred, hence 0.
  if (step === undefined) return rationalCx(field, 0n, 1n);
  if (step.relation === null) throw new RangeError('a step of another degree than 2');
  const theta = solve(field, below, lowerBox(step, box));
  const inverse = inverseCx(combineCx(field, derivativeOf(step.lower), theta));
  const sum = mulCx(combineCx(field, step.relation.sum, theta), inverse);
  const product = mulCx(combineCx(field, step.relation.product, theta), inverse);
  const half = scaleCx(sum, 1n, 2n);
  const root = sqrtCx(addCx(mulCx(half, half), negCx(product)));
  return chosen(addCx(half, root), addCx(half, negCx(root)), box);
}

/** The value of `a` in the tower, given the chain of its polynomial. */
export function toTower(
  field: Field,
  a: Algebraic,
  { start, steps }: { readonly start: Integral; readonly steps: readonly Subfield[] },
): Cx {
  const value = solve(
    field,
    steps,
    integralBox(start, (P) => a.box(P)),
  );
  const scaled = scaleCx(value, start.divisor, start.scale);
  return addCx(scaled, rationalCx(field, start.shift, start.scale));
}
