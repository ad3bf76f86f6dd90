import type { Engine, Num } from '../engine/index';
import type { Evaluator } from './evaluator';
import { fail } from './failure';
import { type ApplicationNode, type Expression, namesBoundIn, partsOf } from './syntax';
import { needAlgebraic } from './values';

/** Coefficients of a polynomial in x, lowest power first, without a leading zero; the empty list is 0. */
export type Polynomial = readonly Num[];

const LARGEST_DEGREE = 64;

/** Names that stand for polynomials: `x`, and inside a function of the notebook its parameters. */
type Variables = ReadonlyMap<string, Polynomial>;

/**
 * Reads an expression as a polynomial in `x` whose coefficients are plain algebraic values.
 * Inside it `x` is the variable, whatever marks there are, and functions of the notebook may be called with it. Division
 * by x, and x under a root, in an exponent or inside a function of the language, are refused.
 */
export function readPolynomial(engine: Engine, evaluator: Evaluator, node: Expression): Polynomial {
  const x: Polynomial = [engine.integer(0n), engine.integer(1n)];
  return readIn(engine, evaluator, node, new Map([['x', x]]));
}

function readIn(
  engine: Engine,
  evaluator: Evaluator,
  node: Expression,
  variables: Variables,
): Polynomial {
  evaluator.begin();
  const polynomial = readNode(engine, evaluator, node, variables);
  evaluator.end();
  return polynomial;
}

function readNode(
  engine: Engine,
  evaluator: Evaluator,
  node: Expression,
  variables: Variables,
): Polynomial {
  const read = (part: Expression): Polynomial => readIn(engine, evaluator, part, variables);
  if (!mentions(node, variables)) {
    const value = evaluator.value(node);
    evaluator.at = node;
    return trim(engine, [needAlgebraic(engine, value, 'A coefficient is a plain number')]);
  }
  switch (node.kind) {
    case 'mark':
      return variables.get(node.name) ?? [];
    case 'application':
      return readCall(engine, evaluator, node, read);
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

/** A function of the notebook with polynomials as its arguments: its value, with these in place of the parameters. */
function readCall(
  engine: Engine,
  evaluator: Evaluator,
  node: ApplicationNode,
  read: (part: Expression) => Polynomial,
): Polynomial {
  const { parameters, where, value } = evaluator.functionOf(node);
  const variables = new Map<string, Polynomial>();
  for (const [index, { name }] of parameters.entries())
    variables.set(name, read(node.args[index] as Expression));
  const outer = evaluator.enter(node);
  for (const local of where)
    variables.set(local.name, readIn(engine, evaluator, local.value, variables));
  const polynomial = readIn(engine, evaluator, value, variables);
  evaluator.leave(node, outer);
  return polynomial;
}

function mentions(node: Expression, variables: { has(name: string): boolean }): boolean {
  if (node.kind === 'mark') return variables.has(node.name);
  return partsOf(node).some((part, index) => {
    const bound = namesBoundIn(node, index);
    const free = { has: (name: string) => !bound.includes(name) && variables.has(name) };
    return mentions(part, bound.length === 0 ? variables : free);
  });
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
