import type { Engine, Num } from '../engine/index';
import type { Evaluator } from './evaluator';
import { fail } from './failure';
import type { Expression } from './syntax';
import { needAlgebraic } from './values';

/** Coefficients of a polynomial in x, lowest power first, without a leading zero; the empty list is 0. */
export type Polynomial = readonly Num[];

const LARGEST_DEGREE = 64;

/**
 * Reads an expression as a polynomial in `x` whose coefficients are plain algebraic values.
 * Inside it `x` is the variable, whatever marks there are. Division by x, and x under a root, in an exponent or inside
 * a function, are refused.
 */
export function readPolynomial(engine: Engine, evaluator: Evaluator, node: Expression): Polynomial {
  const read = (part: Expression): Polynomial => readPolynomial(engine, evaluator, part);
  if (!mentionsX(node)) {
    const value = evaluator.value(node);
    evaluator.at = node;
    return trim(engine, [needAlgebraic(engine, value, 'A coefficient is a plain number')]);
  }
  switch (node.kind) {
    case 'mark':
      return [engine.integer(0n), engine.integer(1n)];
    case 'group':
      return read(node.value);
    case 'negative':
      return read(node.value).map((coefficient) => engine.neg(coefficient));
    case 'sum':
      return node.terms.reduce<Polynomial>((total, term) => {
        const next = read(term.value);
        return addPolynomials(
          engine,
          total,
          term.sign === '+' ? next : next.map((coefficient) => engine.neg(coefficient)),
        );
      }, []);
    case 'product':
      return node.factors.reduce<Polynomial>((total, factor, index) => {
        const next = read(factor.value);
        if (index === 0) return next;
        evaluator.at = factor.value;
        if (factor.operator !== '/') return multiplyPolynomials(engine, total, next);
        const [divisor] = next;
        if (next.length > 1)
          return refuse(factor.value, 'A polynomial is divided only by values without x');
        if (divisor === undefined)
          return fail(
            'division-by-zero',
            'The divisor is exactly 0; a value other than 0 was expected.',
            factor.value,
          );
        return total.map((coefficient) => engine.div(coefficient, divisor));
      }, []);
    case 'power': {
      const exponent = Number(node.exponent.kind === 'number' ? node.exponent.text : Number.NaN);
      if (!Number.isSafeInteger(exponent))
        return refuse(node.exponent, 'A power of x has a whole number as its exponent');
      const base = read(node.base);
      if (exponent * Math.max(1, base.length - 1) > LARGEST_DEGREE) return tooHigh(exponent, node);
      let result: Polynomial = [engine.integer(1n)];
      for (let step = 0; step < exponent; step += 1)
        result = multiplyPolynomials(engine, result, base);
      return result;
    }
    default:
      return refuse(node, 'x stands only in sums, products and whole powers');
  }
}

function refuse(node: Expression, rule: string): never {
  return fail('syntax', `A polynomial in x was expected here: ${rule}.`, node);
}

function tooHigh(degree: number, at: Expression | null): never {
  return fail(
    'limit-size',
    `The polynomial would have degree ${degree} or more; the limit is ${LARGEST_DEGREE}.`,
    at,
  );
}

function mentionsX(node: Expression): boolean {
  switch (node.kind) {
    case 'mark':
      return node.name === 'x';
    case 'sum':
      return node.terms.some((term) => mentionsX(term.value));
    case 'product':
      return node.factors.some((factor) => mentionsX(factor.value));
    case 'power':
      return mentionsX(node.base) || mentionsX(node.exponent);
    case 'call':
      // An inner `root` has an x of its own.
      return node.args.some(
        (arg, index) => !(node.name === 'root' && index === 0) && mentionsX(arg),
      );
    case 'negative':
    case 'group':
    case 'root':
      return mentionsX(node.value);
    default:
      return false;
  }
}

function trim(engine: Engine, coefficients: readonly Num[]): Polynomial {
  let length = coefficients.length;
  while (length > 0 && engine.isZero(coefficients[length - 1] as Num)) length -= 1;
  return coefficients.slice(0, length);
}

function addPolynomials(engine: Engine, a: Polynomial, b: Polynomial): Polynomial {
  const [longer, shorter] = a.length >= b.length ? [a, b] : [b, a];
  return trim(
    engine,
    longer.map((coefficient, power) => {
      const other = shorter[power];
      return other === undefined ? coefficient : engine.add(coefficient, other);
    }),
  );
}

function multiplyPolynomials(engine: Engine, a: Polynomial, b: Polynomial): Polynomial {
  if (a.length === 0 || b.length === 0) return [];
  const degree = a.length + b.length - 2;
  if (degree > LARGEST_DEGREE) return tooHigh(degree, null);
  const product = Array.from({ length: degree + 1 }, () => engine.integer(0n));
  a.forEach((x, i) => {
    b.forEach((y, j) => {
      product[i + j] = engine.add(product[i + j] as Num, engine.mul(x, y));
    });
  });
  return trim(engine, product);
}
