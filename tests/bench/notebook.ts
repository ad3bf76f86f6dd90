/**
 * npm run bench:notebook: what a notebook of 1 000 cells costs the server. A full evaluation, with nothing known; an edit
 * of one mark that ten lines read, with the rest known, as median and worst of many; and the bytes of asking and
 * answering, with and without the digests of what the client has. The database is not part of it.
 */
import { ensureBundles } from '../../lib/evaluation/bundles.mjs';
import { EvaluateRequest, closePool, evaluate } from '../../lib/evaluation/index';

const GROUPS = 100;
const EDITS = 100;
const FULL_RUNS = 5;

interface Cell {
  id: string;
  source: string;
}

/** Ten cells of one ring of stones, as they are written in a setting-out office; `size` sets one ring apart from the others. */
function ring(name: string, size: number, parts: number): string[] {
  return [
    `R${name} = ${size} mm`,
    `t${name} = ${200 + (size % 90)} mm`,
    `E${name} = R${name} + t${name}`,
    `s${name} = chord(R${name}, turn/${parts})`,
    `e${name} = chord(E${name}, turn/${parts})`,
    `h${name} = sagitta(R${name}, turn/${parts})`,
    `d${name} = sqrt(R${name}^2 + E${name}^2)`,
    `q${name} = R${name} sqrt(3) / 2 - t${name}\nR${name} < E${name}`,
    `a${name} = 2 pi R${name} / ${parts}`,
    `m${name} = (s${name} + e${name}) / 2\nm${name} < e${name}`,
  ];
}

const PARTS = [8, 10, 12, 16, 20, 24, 15, 30, 6, 5];

/** The last group is ten lines that all read the mark of the cell before them. */
function notebook(salt: number): Cell[] {
  const sources = Array.from({ length: GROUPS - 1 }, (_, group) =>
    ring(`_${group}`, 700 + salt + 13 * group, PARTS[group % PARTS.length] ?? 8),
  ).flat();
  const readers = [
    'k + 1 mm',
    'ka = 2 k',
    'kb = chord(k, turn/12)',
    'kc = k sqrt(2)',
    'kd = sqrt(k^2 + (300 mm)^2)',
    'ke = k/7',
    'kf = 2 pi k',
    'kg = sagitta(k, turn/8)',
    'k < 9 m',
    'kh = k cos(turn/10)',
  ];
  const all = [...sources.slice(0, -1), `k = ${900 + salt} mm`, ...readers];
  return all.map((source, index) => ({ id: `c${index}`, source }));
}

const edited = (cells: readonly Cell[], size: number): Cell[] =>
  cells.map((cell) =>
    cell.source.startsWith('k = ') ? { ...cell, source: `k = ${size} mm` } : cell,
  );

const settings = { digits: 30, unit: 'mm', step: '0.5 mm', rounding: 'half-even' } as const;
const have: Record<string, string> = {};

async function ask(cells: readonly Cell[], withDigests: boolean) {
  const sent = JSON.stringify({ cells, settings, ...(withDigests ? { have } : {}) });
  const before = process.cpuUsage();
  const start = performance.now();
  const answer = await evaluate(EvaluateRequest.parse(JSON.parse(sent)));
  const received = JSON.stringify(answer);
  const time = performance.now() - start;
  const { user, system } = process.cpuUsage(before);
  for (const { id, digest } of answer.cells ?? []) if (digest !== undefined) have[id] = digest;
  return {
    time,
    processor: (user + system) / 1e3,
    sent: sent.length,
    received: received.length,
    answer,
  };
}

const sorted = (times: readonly number[]): number[] => [...times].sort((a, b) => a - b);
const median = (times: readonly number[]): number => sorted(times)[times.length >> 1] ?? NaN;

function row(what: string, amount: string): void {
  process.stdout.write(`${what.padEnd(62)} ${amount.padStart(16)}\n`);
}
const inMilliseconds = (time: number): string => `${time.toFixed(1)} ms`;

await ensureBundles();
await ask([{ id: 'warm', source: '1' }], false);
const full: number[] = [];
const fullProcessor: number[] = [];
let failed = 0;
for (let run = 0; run < FULL_RUNS; run += 1) {
  const { time, processor, answer } = await ask(notebook(1000 * run), false);
  full.push(time);
  fullProcessor.push(processor);
  failed += (answer.cells ?? [])
    .flatMap(({ results }) => results)
    .filter(({ kind }) => kind === 'error').length;
}
row(
  `full evaluation of ${notebook(0).length} cells, median of ${FULL_RUNS}`,
  inMilliseconds(median(full)),
);
row(
  'the same, first and slowest',
  `${inMilliseconds(full[0] ?? NaN)}, ${inMilliseconds(Math.max(...full))}`,
);
row('processor time of the server, children apart, median', inMilliseconds(median(fullProcessor)));
row('lines in error (none are meant to be)', String(failed));

const cells = notebook(1000 * (FULL_RUNS - 1));
const whole = await ask(cells, true);
const edits: number[] = [];
const editsProcessor: number[] = [];
let last = whole;
for (let edit = 0; edit < EDITS; edit += 1) {
  last = await ask(edited(cells, 2000 + edit), true);
  edits.push(last.time);
  editsProcessor.push(last.processor);
}
row(`edit of a mark with ten readers, median of ${EDITS}`, inMilliseconds(median(edits)));
row(
  'the same, nine of ten below, and slowest',
  `${inMilliseconds(sorted(edits)[Math.floor(EDITS * 0.9)] ?? NaN)}, ${inMilliseconds(Math.max(...edits))}`,
);
row('processor time of the server, children apart, median', inMilliseconds(median(editsProcessor)));
row('cells answered to such an edit', String(last.answer.cells?.length));
row('bytes sent, bytes received with digests', `${last.sent}, ${last.received}`);
const plain = await ask(edited(cells, 2000), false);
row('bytes sent, bytes received without', `${plain.sent}, ${plain.received}`);
await closePool();
