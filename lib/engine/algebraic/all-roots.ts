/**
 * All roots of a squarefree integer polynomial, isolated: simultaneous iteration (Ehrlich 1967, Aberth 1973) in
 * fixed-point integers finds approximations, the interval Newton operator proves each one. The approximations are
 * never trusted; when a proof fails the precision is doubled.
 */
import type { Budget } from '../limits';
import { bitLength } from '../integers';
import {
  degreeOf,
  derivativeOf,
  leadingOf,
  maxBits,
  type IntegerPoly,
} from '../polynomials/integer-poly';
import { areApart, type Box } from './box';
import { isolate } from './newton';

/** Half the width of a box put to the proof, in units of the last place: well above the rounding of Horner's rule. */
const MARGIN = 1n << 20n;

interface Point {
  re: bigint;
  im: bigint;
}

/** Rounds at one precision before it is doubled; convergence is linear at first and cubic in the end. */
const ROUNDS = 100;

function times(a: Point, b: Point, p: bigint): Point {
  return {
    re: (a.re * b.re - a.im * b.im) >> p,
    im: (a.re * b.im + a.im * b.re) >> p,
  };
}

function over(a: Point, b: Point, p: bigint): Point {
  const size = b.re * b.re + b.im * b.im;
  // No direction is better than another here; a large step leaves the place.
  if (size === 0n) return { re: a.re + (1n << p), im: a.im + (1n << p) };
  return {
    re: ((a.re * b.re + a.im * b.im) << p) / size,
    im: ((a.im * b.re - a.re * b.im) << p) / size,
  };
}

function evaluatePoint(f: IntegerPoly, at: Point, p: bigint): Point {
  let value: Point = { re: 0n, im: 0n };
  for (let k = f.length - 1; k >= 0; k--) {
    value = times(value, at, p);
    value = { re: value.re + ((f[k] as bigint) << p), im: value.im };
  }
  return value;
}

/** Bits of a radius that holds all roots: 2·max |f_(n−k)/f_n|^(1/k) (Fujiwara 1916), rounded up to a power of two. */
export function rootBits(f: IntegerPoly): number {
  const lead = bitLength(leadingOf(f));
  let most = 0;
  for (let k = 1; k < f.length; k++) {
    const c = bitLength(f[f.length - 1 - k] as bigint);
    if (c > 0) most = Math.max(most, Math.ceil((c - lead + 1) / k));
  }
  return most + 1;
}

/** Start values on a circle, turned by an angle that no symmetry of the roots shares: powers of (3+4i)/5 to a root. */
function startPoints(n: number, bits: number, p: bigint): Point[] {
  const one = 1n << p;
  // A unit vector with no rational relation to a turn; its powers spread evenly enough over the circle.
  const turn: Point = { re: (one * 3n) / 5n, im: (one * 4n) / 5n };
  const radius = bits >= 1 ? 1n << BigInt(bits - 1) : 1n;
  const points: Point[] = [];
  let direction: Point = { re: one, im: 0n };
  for (let k = 0; k < n; k++) {
    direction = times(direction, turn, p);
    // Radii differ a little, so that no two points come to lie symmetric to the real axis.
    const scale = 1024n + BigInt((k * 37) % 101);
    points.push({
      re: (direction.re * radius * scale) >> 11n,
      im: (direction.im * radius * scale) >> 11n,
    });
  }
  return points;
}

/** One round; returns the size of the largest correction. */
function iterate(f: IntegerPoly, slope: IntegerPoly, points: Point[], p: bigint): bigint {
  let largest = 0n;
  for (let k = 0; k < points.length; k++) {
    const z = points[k] as Point;
    const value = evaluatePoint(f, z, p);
    if (value.re === 0n && value.im === 0n) continue;
    let pull = over(evaluatePoint(slope, z, p), value, p);
    for (let j = 0; j < points.length; j++) {
      if (j === k) continue;
      const other = points[j] as Point;
      const away = over({ re: 1n << p, im: 0n }, { re: z.re - other.re, im: z.im - other.im }, p);
      pull = { re: pull.re - away.re, im: pull.im - away.im };
    }
    const correction = over({ re: 1n << p, im: 0n }, pull, p);
    points[k] = { re: z.re - correction.re, im: z.im - correction.im };
    for (const part of [correction.re, correction.im]) {
      const size = part < 0n ? -part : part;
      if (size > largest) largest = size;
    }
  }
  return largest;
}

/** Isolating boxes at one precision, or null where some root is not proven yet. */
function proven(f: IntegerPoly, points: readonly Point[], P: number): Box[] | null {
  const boxes: Box[] = [];
  for (const z of points) {
    const box = isolate(
      f,
      {
        re: { low: z.re - MARGIN, high: z.re + MARGIN },
        im: { low: z.im - MARGIN, high: z.im + MARGIN },
      },
      P,
    );
    if (box === null || boxes.some((other) => !areApart(other, box))) return null;
    boxes.push(box);
  }
  return boxes;
}

/** Boxes of all roots of a squarefree f of positive degree, each with one root, disjoint; real ones are flat. */
export function isolateRoots(f: IntegerPoly, budget: Budget): { boxes: Box[]; precision: number } {
  const n = degreeOf(f);
  const slope = derivativeOf(f);
  const bits = rootBits(f);
  let P = 64 + 2 * n + Math.max(0, bits) + maxBits(f);
  let points = startPoints(n, bits, BigInt(P));
  for (;;) {
    for (let round = 0; round < ROUNDS; round++) {
      budget.charge(n * n * (8 + (P >> 4)));
      const correction = iterate(f, slope, points, BigInt(P));
      if (correction >> BigInt(P >> 1) !== 0n) continue;
      const boxes = proven(f, points, P);
      if (boxes !== null) return { boxes, precision: P };
      if (correction < 64n) break;
    }
    points = points.map((z) => ({ re: z.re << BigInt(P), im: z.im << BigInt(P) }));
    P *= 2;
  }
}
