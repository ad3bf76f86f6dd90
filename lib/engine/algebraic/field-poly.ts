/** Polynomials over a number field, constant term first, without leading zeros: remainders and greatest common divisors. */
import type { FieldElement, NumberField } from './number-field';

export type FieldPoly = readonly FieldElement[];

export function trimField(field: NumberField, f: FieldPoly): FieldPoly {
  let length = f.length;
  while (length > 0 && field.isZero(f[length - 1] as FieldElement)) length--;
  return f.slice(0, length);
}

/** f with leading coefficient 1; f is not 0. */
export function monicField(field: NumberField, f: FieldPoly): FieldPoly {
  const inverse = field.inverse(f[f.length - 1] as FieldElement);
  return f.map((c) => field.multiply(c, inverse));
}

/** The rest of f on division by a monic g. */
export function remainderField(field: NumberField, f: FieldPoly, g: FieldPoly): FieldPoly {
  const rest = [...f];
  const n = g.length - 1;
  for (let k = rest.length - 1; k >= n; k--) {
    const q = field.scale(rest[k] as FieldElement, -1n, 1n);
    if (field.isZero(q)) continue;
    for (let j = 0; j < n; j++) {
      const at = k - n + j;
      rest[at] = field.add(rest[at] as FieldElement, field.multiply(q, g[j] as FieldElement));
    }
  }
  return trimField(field, rest.slice(0, Math.min(n, rest.length)));
}

/** Monic greatest common divisor by Euclid's algorithm; not both are 0. */
export function gcdField(
  field: NumberField,
  f: FieldPoly,
  g: FieldPoly,
  charge: (work: number) => void,
): FieldPoly {
  let [a, b] = [trimField(field, f), trimField(field, g)];
  while (b.length > 0) {
    charge(field.degree ** 3 + a.length * b.length * field.degree ** 2);
    const divisor = monicField(field, b);
    [a, b] = [divisor, remainderField(field, a, divisor)];
  }
  return monicField(field, a);
}

export function derivativeField(field: NumberField, f: FieldPoly): FieldPoly {
  return f.slice(1).map((c, k) => field.scale(c, BigInt(k + 1), 1n));
}
