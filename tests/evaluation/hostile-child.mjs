// Speaks the protocol of the evaluation children; each line of a cell says what shall go wrong.
import { writeSync } from 'node:fs';

const report = (message) => {
  const { user, system } = process.cpuUsage();
  writeSync(1, `${JSON.stringify({ ...message, spent: (user + system) / 1e3 })}\n`);
};
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

process.on('message', ({ job, tasks, refused, brief }) => {
  const [refusedValues, briefTasks] = [refused, brief].map((entries) => new Map(entries));
  try {
    tasks.forEach(({ source, value }, task) => {
      if (refusedValues.has(value)) return;
      const [action, part] = source.split(' ');
      report({ kind: 'started', job, task });
      if (part === 'late') report({ kind: 'valued', job, task });
      if (!briefTasks.has(task)) ACTIONS[action]?.();
      const code = briefTasks.has(task) ? `brief ${briefTasks.get(task).code}` : 'fine';
      report({ kind: 'finished', job, task, outcome: { code }, lasting: true });
    });
    report({ kind: 'done', job });
  } catch (error) {
    const code = error instanceof RangeError ? 'limit-size' : 'fault';
    report({ kind: 'fault', job, refusal: { code, message: 'stopped' }, detail: error.message });
  }
});
report({ kind: 'ready', job: 0 });
process.on('disconnect', () => process.exit(0));
