import { type Expression, namesBoundIn, partsOf } from './syntax';

/** Whether a name occurs in an expression with the meaning that it has outside it. */
export function mentions(node: Expression, name: string): boolean {
  if (node.kind === 'mark') return node.name === name;
  return partsOf(node).some(
    (part, index) => !namesBoundIn(node, index).includes(name) && mentions(part, name),
  );
}
