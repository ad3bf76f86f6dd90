/** The order of evaluation of lines that read each other's marks. */
export interface Ordering {
  /** Every vertex once; what a vertex reads stands before it, cycles apart. */
  readonly order: readonly number[];
  /** For each vertex on a cycle, the vertices of that cycle's component in increasing order. */
  readonly cycles: ReadonlyMap<number, readonly number[]>;
}

/**
 * Strongly connected components by Tarjan's method (1972), without recursion so that a chain of thousands of lines
 * needs no stack. `reads[v]` lists what v reads. Cost: vertices plus edges.
 */
export function orderByDependence(reads: readonly (readonly number[])[]): Ordering {
  const index = new Array<number>(reads.length).fill(-1);
  const low = new Array<number>(reads.length).fill(0);
  const onStack = new Array<boolean>(reads.length).fill(false);
  const stack: number[] = [];
  const order: number[] = [];
  const cycles = new Map<number, readonly number[]>();
  let counter = 0;

  const open = (vertex: number): void => {
    index[vertex] = low[vertex] = counter;
    counter += 1;
    stack.push(vertex);
    onStack[vertex] = true;
  };
  const close = (vertex: number): void => {
    if (low[vertex] !== index[vertex]) return;
    const component: number[] = [];
    for (let member = stack.pop(); member !== undefined; member = stack.pop()) {
      onStack[member] = false;
      component.push(member);
      if (member === vertex) break;
    }
    component.sort((a, b) => a - b);
    order.push(...component);
    if (component.length > 1 || (reads[vertex] ?? []).includes(vertex)) {
      for (const member of component) cycles.set(member, component);
    }
  };

  for (let root = 0; root < reads.length; root += 1) {
    if (index[root] !== -1) continue;
    open(root);
    const path = [{ vertex: root, next: 0 }];
    for (let top = path.at(-1); top !== undefined; top = path.at(-1)) {
      const target = reads[top.vertex]?.[top.next];
      if (target === undefined) {
        close(top.vertex);
        path.pop();
        const parent = path.at(-1)?.vertex;
        if (parent !== undefined) low[parent] = Math.min(low[parent] ?? 0, low[top.vertex] ?? 0);
      } else {
        top.next += 1;
        if (index[target] === -1) {
          open(target);
          path.push({ vertex: target, next: 0 });
        } else if (onStack[target] === true) {
          low[top.vertex] = Math.min(low[top.vertex] ?? 0, index[target] ?? 0);
        }
      }
    }
  }
  return { order, cycles };
}
