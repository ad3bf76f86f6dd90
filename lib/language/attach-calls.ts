import {
  type Expression,
  type Factor,
  type GroupNode,
  type ProductNode,
  type Statement,
  namesBoundIn,
} from './syntax';

/** Whether a name with a bracket after it is a function; `several` when the bracket holds more than one value. */
type IsFunction = (name: string, several: boolean) => boolean;

/**
 * Turns products of a name and a bracket into calls where the name is a function: `f(3)` is read as a product first,
 * as only the whole notebook tells which names are functions. A call binds as closely as one of the language's own
 * functions: `f(3)^2` is `(f(3))^2`, `√f(3)` is `√(f(3))`, `2^f(3)` is `2^(f(3))`. Parameters, local names and counters
 * stay what they are. Gives the same tree back where nothing changes. Cost: linear.
 */
export function attachCalls<S extends Statement>(statement: S, isFunction: IsFunction): S {
  const bound = new Set(
    statement.kind === 'function' ? statement.parameters.map(({ name }) => name) : [],
  );
  const where = statement.where.map((local) => {
    const value = attach(local.value, bound, isFunction);
    bound.add(local.name);
    return value === local.value ? local : { ...local, value };
  });
  const changedWhere = where.some((local, index) => local !== statement.where[index]);
  if (statement.kind === 'decision') {
    const sides = statement.sides.map((side) => attach(side, bound, isFunction));
    const changed = sides.some((side, index) => side !== statement.sides[index]);
    return changed || changedWhere ? { ...statement, sides, where } : statement;
  }
  const value = attach(statement.value, bound, isFunction);
  return value !== statement.value || changedWhere ? { ...statement, value, where } : statement;
}

function attach(node: Expression, bound: ReadonlySet<string>, isFunction: IsFunction): Expression {
  const inner = mapParts(node, (part, index) => {
    const names = namesBoundIn(node, index);
    return attach(part, names.length === 0 ? bound : new Set([...bound, ...names]), isFunction);
  });
  if (inner.kind !== 'product') return inner;
  return joinCalls(inner, (name, several) => !bound.has(name) && isFunction(name, several));
}

function joinCalls(product: ProductNode, isFunction: IsFunction): Expression {
  const factors: Factor[] = [];
  for (const factor of product.factors) {
    const before = factors.at(-1);
    const call =
      before !== undefined && factor.operator === 'implied'
        ? callOf(before.value, factor.value, isFunction)
        : null;
    if (before !== undefined && call !== null)
      factors[factors.length - 1] = { ...before, value: call };
    else factors.push(factor);
  }
  if (factors.length === product.factors.length) return product;
  const [only] = factors;
  return factors.length === 1 && only !== undefined ? only.value : { ...product, factors };
}

/** What stands on the way from a factor to the name at its right end, outermost first. */
type Wrapper = Extract<Expression, { kind: 'negative' | 'root' | 'power' }>;

/** Joins a factor that ends in a name of a function with a bracket, its indices and its exponent; else null. */
function callOf(before: Expression, after: Expression, isFunction: IsFunction): Expression | null {
  const wrappers: Wrapper[] = [];
  let end = before;
  for (;;) {
    if (end.kind === 'negative' || end.kind === 'root') {
      wrappers.push(end);
      end = end.value;
    } else if (end.kind === 'power') {
      wrappers.push(end);
      end = end.exponent;
    } else break;
  }
  if (end.kind !== 'mark') return null;
  const [power, indexed] = after.kind === 'power' ? [after, after.base] : [null, after];
  const group = groupUnder(indexed);
  if (group === null || !isFunction(end.name, group.more.length > 0)) return null;
  const args = [group.value, ...group.more];
  let call: Expression = { kind: 'application', callee: end, args, from: end.from, to: group.to };
  call = replaceGroup(indexed, call);
  // An exponent stands outside the roots before the name, as in √2^2.
  while (wrappers.at(-1)?.kind === 'root') call = wrap(wrappers.pop() as Wrapper, call);
  if (power !== null) call = { ...power, base: call, from: call.from };
  while (wrappers.length > 0) call = wrap(wrappers.pop() as Wrapper, call);
  return call;
}

function groupUnder(node: Expression): GroupNode | null {
  if (node.kind === 'index') return groupUnder(node.list);
  return node.kind === 'group' ? node : null;
}

function replaceGroup(node: Expression, call: Expression): Expression {
  return node.kind === 'index'
    ? { ...node, list: replaceGroup(node.list, call), from: call.from }
    : call;
}

function wrap(wrapper: Wrapper, inner: Expression): Expression {
  return wrapper.kind === 'power'
    ? { ...wrapper, exponent: inner, to: inner.to }
    : { ...wrapper, value: inner, to: inner.to };
}

/** The node with its parts changed; the same node when none of them is. Numbers, names and quantities have none. */
function mapParts(
  node: Expression,
  change: (part: Expression, index: number) => Expression,
): Expression {
  const changeAll = (parts: readonly Expression[]): readonly Expression[] => {
    const changed = parts.map(change);
    return changed.every((part, index) => part === parts[index]) ? parts : changed;
  };
  switch (node.kind) {
    case 'sum': {
      const values = node.terms.map((term) => term.value);
      const changed = changeAll(values);
      return changed === values
        ? node
        : {
            ...node,
            terms: node.terms.map((term, index) => ({
              ...term,
              value: changed[index] as Expression,
            })),
          };
    }
    case 'product': {
      const values = node.factors.map((factor) => factor.value);
      const changed = changeAll(values);
      return changed === values
        ? node
        : {
            ...node,
            factors: node.factors.map((factor, index) => ({
              ...factor,
              value: changed[index] as Expression,
            })),
          };
    }
    case 'call':
    case 'application': {
      const args = changeAll(node.args);
      return args === node.args ? node : { ...node, args };
    }
    case 'list': {
      const items = changeAll(node.items);
      return items === node.items ? node : { ...node, items };
    }
    case 'power': {
      const [base, exponent] = [change(node.base, 0), change(node.exponent, 1)];
      return base === node.base && exponent === node.exponent ? node : { ...node, base, exponent };
    }
    case 'each': {
      const [first, last, value] = [
        change(node.first, 0),
        change(node.last, 1),
        change(node.value, 2),
      ];
      const same = first === node.first && last === node.last && value === node.value;
      return same ? node : { ...node, first, last, value };
    }
    case 'equation': {
      const [left, right] = [change(node.left, 0), change(node.right, 1)];
      return left === node.left && right === node.right ? node : { ...node, left, right };
    }
    case 'index': {
      const [list, index] = [change(node.list, 0), change(node.index, 1)];
      return list === node.list && index === node.index ? node : { ...node, list, index };
    }
    case 'group': {
      const value = change(node.value, 0);
      const more = changeAll(node.more);
      return value === node.value && more === node.more ? node : { ...node, value, more };
    }
    case 'negative':
    case 'root': {
      const value = change(node.value, 0);
      return value === node.value ? node : { ...node, value };
    }
    default:
      return node;
  }
}
