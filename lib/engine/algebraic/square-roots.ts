/**
 * A number beyond the tower brought back into it: its quadratic chain solved from the bottom up with the exact
 * arithmetic of the tower, each time taking the root that the number's own box names.
 */
import { addCx, mulCx, negCx, real, sqrtCx } from '../complex';
import { rationalEl, scaleEl } from '../element';
import { enclose } from '../enclosure';
import * as Z from '../int';
import type { Cx } from '../complex';
import type { Field } from '../tower';
import type { IntegerPoly } from '../polynomials/integer-poly';
import type { Algebraic } from './algebraic';
import { areApart, addBox, multiplyBox, pointBox, type Box } from './box';
import type { Combination, QuadraticStep } from './quadratic-chain';
import { fraction, boxOf } from './operations';

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
function combineCx(field: Field, c: Combination, theta: Cx): Cx {
  let value = rationalCx(field, 0n, 1n);
  for (let k = c.numerator.length - 1; k >= 0; k--) {
    value = addCx(mulCx(value, theta), rationalCx(field, c.numerator[k] as bigint, c.denominator));
  }
  return value;
}

function combineBox(c: Combination, at: Box, P: number): Box {
  let value = pointBox(0n, P);
  for (let k = c.numerator.length - 1; k >= 0; k--) {
    value = addBox(
      multiplyBox(value, at, P),
      boxOf(fraction(c.numerator[k] as bigint, c.denominator), P),
    );
  }
  return value;
}

/** Of two values the one that the boxes close in on. */
function chosen(a: Cx, b: Cx, box: (P: number) => Box): Cx {
  for (let P = 64; ; P *= 2) {
    const target = box(P);
    if (areApart(cxBox(b, P), target)) return a;
    if (areApart(cxBox(a, P), target)) return b;
  }
}

function solve(
  field: Field,
  steps: readonly QuadraticStep[],
  bottom: IntegerPoly,
  box: (P: number) => Box,
): Cx {
  const [step, ...below] = steps;
  if (step === undefined) return rationalCx(field, -(bottom[0] as bigint), bottom[1] as bigint);
  const integral = (P: number): Box => multiplyBox(box(P), pointBox(step.scale, P), P);
  const theta = solve(field, below, bottom, (P) => combineBox(step.theta, integral(P), P));
  const beta = combineCx(field, step.beta, theta);
  const gamma = combineCx(field, step.gamma, theta);
  const half = scaleCx(beta, 1n, 2n);
  const root = sqrtCx(addCx(mulCx(half, half), negCx(gamma)));
  const value = chosen(addCx(half, root), addCx(half, negCx(root)), integral);
  return scaleCx(value, 1n, step.scale);
}

/** The value of `a` in the tower, given its chain; `bottom` is the linear polynomial that the chain ends in. */
export function toTower(
  field: Field,
  a: Algebraic,
  chain: { readonly steps: readonly QuadraticStep[]; readonly bottom: IntegerPoly },
): Cx {
  return solve(field, chain.steps, chain.bottom, (P) => a.box(P));
}
