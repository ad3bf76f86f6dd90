/**
 * npm run bench [-- task … --peers --seconds=60]
 *
 * Prints one row per task: the median CPU time of several warm runs, in milliseconds, and with --peers the same for those Debian
 * packages that are installed (libcalcium as qqbar and ca, pari-gp, python3-sympy), measured in the same run, with the ratio
 * to the fastest of them that gave an exact answer. CPU time, so that a busy machine disturbs little.
 */

import { readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { createEngine } from '../../lib/engine/index';
import { LIMIT_SECONDS, peersAvailable, runPeer, type PeerName } from './peers';
import { parseProgram, runProgram } from './straight-line';

const TASKS: Record<string, string> = {
  T1: '√(5+2√6) = √2+√3',
  T2: "Shanks' identity",
  T3a: 'minimal polynomial, sum of 5 roots',
  T3b: 'minimal polynomial, sum of 6 roots',
  T4: '1/(1+√2+√3+√5+√7) written out',
  T5z: "Gauss's radicals less roots of unity: zero",
  T5m: 'their minimal polynomial',
  T6: '17-gon by rotation: sums are zero',
  T7a: 'near-tie of 8 roots',
  T7b: 'near-tie of 16 roots',
  T8r: 'cos of a 257th from 24 quadratics',
  T8n: 'the same against the root of unity',
  T8m: 'its minimal polynomial, degree 128',
  T8c: 'minimal polynomial of cos(2π/257)',
  T9s: 'signs of 1000 random expressions',
  T9m: 'minimal polynomials of 1000 expressions',
  T10: '50 circle intersections in a ring',
  T10b: 'the same with hidden squares',
};

const folder = fileURLToPath(new URL('./tasks/', import.meta.url));

function milliseconds(work: () => void): number {
  const start = process.cpuUsage();
  work();
  const used = process.cpuUsage(start);
  return (used.user + used.system) / 1000;
}

function median(times: readonly number[]): number {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] as number;
}

/** Median of warm runs: short tasks are repeated in batches, because CPU time is counted coarsely. */
function measure(work: () => void): number {
  const first = milliseconds(work);
  const batch = Math.max(1, Math.ceil(10 / Math.max(first, 0.05)));
  const rounds = first > 2000 ? 1 : first > 300 ? 3 : 9;
  const warm = process.cpuUsage().user;
  for (let i = 0; i < 1000 && process.cpuUsage().user - warm < 1_500_000; i++) work();
  const times: number[] = [];
  for (let i = 0; i < rounds; i++) {
    times.push(
      milliseconds(() => {
        for (let j = 0; j < batch; j++) work();
      }) / batch,
    );
  }
  return median(times);
}

function figure(ms: number | null): string {
  if (ms === null) return '–';
  return ms < 10 ? ms.toFixed(3) : ms < 100 ? ms.toFixed(1) : ms.toFixed(0);
}

function row(cells: readonly string[]): void {
  const widths = [5, 42, 9, 12, 12, 12, 12, 8];
  process.stdout.write(
    cells
      .map((c, i) => (i < 2 ? c.padEnd(widths[i] as number) : c.padStart(widths[i] as number)))
      .join(' ') + '\n',
  );
}

function growth(): void {
  process.stdout.write('\nCost by degree: x = √2 + √(2+√2) + …, warm median in ms\n');
  row(['deg', '', 'multiply', 'invert', 'sqrt(x²)', 'polynomial', 'certificate']);
  for (let k = 1; k <= 8; k++) {
    const e = createEngine({ steps: Number.MAX_SAFE_INTEGER });
    let root = e.sqrt(e.integer(2));
    let x = e.add(root, e.integer(1));
    for (let i = 1; i < k; i++) {
      root = e.sqrt(e.add(e.integer(2), root));
      x = e.add(x, root);
    }
    const y = e.add(e.mul(x, x), e.integer(1));
    const square = e.mul(x, x);
    const fresh = (ask: (f: ReturnType<typeof createEngine>, z: typeof x) => unknown): number => {
      const f = createEngine({ steps: Number.MAX_SAFE_INTEGER });
      let r = f.sqrt(f.integer(2));
      let z = f.add(r, f.integer(1));
      for (let i = 1; i < k; i++) {
        r = f.sqrt(f.add(f.integer(2), r));
        z = f.add(z, r);
      }
      return milliseconds(() => ask(f, z));
    };
    row([
      String(2 ** k),
      '',
      figure(measure(() => e.mul(x, y))),
      figure(measure(() => e.inverse(x))),
      figure(median([1, 2, 3, 4, 5].map(() => fresh((f, z) => f.sqrt(f.mul(z, z)))))),
      figure(median([1, 2, 3, 4, 5].map(() => fresh((f, z) => f.minimalPolynomial(z))))),
      figure(k > 6 ? null : median([1, 2, 3].map(() => fresh((f, z) => f.certificate(z))))),
    ]);
    if (!e.equal(e.mul(x, x), square)) throw new Error('a product changed');
  }
}

function main(): void {
  const args = process.argv.slice(2);
  const wanted = args.filter((a) => !a.startsWith('--'));
  const limit = Number(args.find((a) => a.startsWith('--seconds='))?.slice(10) ?? LIMIT_SECONDS);
  const peers: PeerName[] = args.includes('--peers') ? peersAvailable() : [];
  row(['task', 'what', 'ours', ...peers, ...(peers.length > 0 ? ['ratio'] : [])]);
  const files = readdirSync(folder).map((f) => f.replace('.slp', ''));
  for (const [task, what] of Object.entries(TASKS)) {
    if (!files.includes(task) || (wanted.length > 0 && !wanted.includes(task))) continue;
    const program = parseProgram(readFileSync(`${folder}${task}.slp`, 'utf8'));
    const ours = measure(() => runProgram(program));
    const theirs = peers.map((p) => runPeer(p, task, folder, limit));
    const best = theirs.filter((t) => t.exact && t.ms !== null).map((t) => t.ms as number);
    const ratio = best.length === 0 ? '' : `×${(Math.min(...best) / ours).toFixed(1)}`;
    row([
      task,
      what,
      figure(ours),
      ...theirs.map((t) => t.note ?? figure(t.ms)),
      ...(peers.length > 0 ? [ratio] : []),
    ]);
  }
  if (wanted.length === 0) growth();
}

main();
