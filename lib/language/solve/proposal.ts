import type { Expression } from '../syntax';
import { mentions } from '../names-in';

/** Gives candidates for `x` of an equation in `x`, `k1`, `k2`, …; none of them is to be trusted. */
export type Proposer = (equation: string) => readonly string[];

/** An equation as a proposer takes it: every part without the unknown has become one of the names k1, k2, …. */
export interface Question {
  readonly equation: string;
  readonly parts: ReadonlyMap<string, Expression>;
}

/** Functions that a proposer is asked about by the same name; what else holds the unknown is not asked about. */
const FUNCTIONS = new Set([
  'sqrt',
  'cbrt',
  'abs',
  'sin',
  'cos',
  'tan',
  'cot',
  'sec',
  'csc',
  'asin',
  'acos',
  'atan',
]);

/**
 * The equation with a name for every known part, or, with `whole`, with its whole numbers as they are: exponents are
 * found only from numbers. Null where the unknown stands in a form that a proposer does not know.
 */
export function questionOf(
  left: Expression,
  right: Expression,
  unknown: string,
  whole: boolean,
): Question | null {
  const parts = new Map<string, Expression>();
  const write = (node: Expression): string | null => {
    if (!mentions(node, unknown)) {
      if (whole && node.kind === 'number' && !node.text.includes('.')) return node.text;
      const name = `k${parts.size + 1}`;
      parts.set(name, node);
      return name;
    }
    const all = (
      nodes: readonly Expression[],
      join: (texts: string[]) => string,
    ): string | null => {
      const texts = nodes.map(write);
      return texts.every((text) => text !== null) ? join(texts) : null;
    };
    switch (node.kind) {
      case 'mark':
        return 'x';
      case 'group':
        return all([node.value], ([text]) => `(${text})`);
      case 'negative':
        return all([node.value], ([text]) => `(-(${text}))`);
      case 'root':
        return all([node.value], ([text]) => `sqrt(${text})`);
      case 'sum':
        return all(
          node.terms.map(({ value }) => value),
          (texts) => texts.map((text, at) => `${node.terms[at]?.sign ?? '+'}(${text})`).join(''),
        );
      case 'product':
        return all(
          node.factors.map(({ value }) => value),
          (texts) =>
            texts.reduce(
              (before, text, at) =>
                `(${before})${node.factors[at]?.operator === '/' ? '/' : '*'}(${text})`,
            ),
        );
      case 'power':
        return all([node.base, node.exponent], ([base, exponent]) => `(${base})^(${exponent})`);
      case 'call':
        return FUNCTIONS.has(node.name)
          ? all(node.args, (texts) => `${node.name}(${texts.join(',')})`)
          : null;
      default:
        return null;
    }
  };
  const [a, b] = [write(left), write(right)];
  return a === null || b === null ? null : { equation: `${a}=${b}`, parts };
}
