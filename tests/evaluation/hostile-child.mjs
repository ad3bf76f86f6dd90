// Speaks the protocol of the evaluation children; each line of a cell says what shall go wrong.
import { writeSync } from 'node:fs';

const report = (message) => writeSync(1, `${JSON.stringify(message)}\n`);
const keep = [];

const ACTIONS = {
  hang: () => {
    for (;;) keep.length = 0;
  },
  objects: () => {
    for (;;) keep.push({ more: keep.length, text: String(keep.length) });
  },
  bigints: () => {
    for (let n = 3n; ; n = n * n + 1n) keep.push(n);
  },
  array: () => keep.push(...Array.from({ length: 40 }, () => new Array(20_000_000).fill(1.5))),
  bytes: () => {
    for (;;) keep.push(new Uint8Array(1_000_000).fill(1));
  },
  map: () => {
    const map = new Map();
    for (let n = 0; ; n += 1) map.set(n, n);
  },
  exit: () => process.exit(3),
  abort: () => process.abort(),
  deep: () => {
    const deeper = (n) => deeper(n + 1) + 1;
    return deeper(0);
  },
  throw: () => {
    throw new TypeError('a mistake');
  },
};

process.on('message', ({ job, cells, known, refused, brief }) => {
  const [knownLines, refusedLines, briefLines] = [known, refused, brief].map(
    (entries) => new Map(entries),
  );
  try {
    cells.forEach(({ source }, cell) =>
      source.split('\n').forEach((text, index) => {
        const place = { job, cell, line: index + 1 };
        const key = `${cell}:${index + 1}`;
        if (knownLines.has(key)) return;
        const [action, part] = text.split(' ');
        report({ kind: 'started', ...place });
        const refusal = refusedLines.get(key);
        if (part === 'late') report({ kind: 'valued', ...place });
        if (refusal === undefined && !briefLines.has(key)) ACTIONS[action]?.();
        const code =
          refusal?.code ?? (briefLines.has(key) ? `brief ${briefLines.get(key).code}` : 'fine');
        report({ kind: 'finished', ...place, result: { line: index + 1, source: text, code } });
      }),
    );
    report({ kind: 'done', job, result: null, processorTime: 0.1 });
  } catch (error) {
    const code = error instanceof RangeError ? 'limit-size' : 'fault';
    report({ kind: 'fault', job, refusal: { code, message: 'stopped' }, detail: error.message });
  }
});
report({ kind: 'ready', job: 0 });
process.on('disconnect', () => process.exit(0));
