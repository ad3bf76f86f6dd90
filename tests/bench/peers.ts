/** The peers of the bench: which are installed, and what they take for a task. */

import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export type PeerName = 'qqbar' | 'ca' | 'pari' | 'sympy';

export interface Measured {
  /** Median CPU time in milliseconds; null when there is none. */
  ms: number | null;
  /** What to print instead, when there is something to say. */
  note: string | null;
  exact: boolean;
}

const sources = fileURLToPath(new URL('./peers/', import.meta.url));
const build = fileURLToPath(new URL('../../.build/', import.meta.url));

/** A peer may take this long for one run unless `--seconds=` says otherwise. */
export const LIMIT_SECONDS = 60;

function works(command: string, args: string[]): boolean {
  return spawnSync(command, args, { stdio: 'ignore' }).status === 0;
}

/** Compiles the C runners where libcalcium is installed and finds the others. */
export function peersAvailable(): PeerName[] {
  const out: PeerName[] = [];
  mkdirSync(build, { recursive: true });
  for (const name of ['qqbar', 'ca'] as const) {
    const libraries = ['-lcalcium', '-lantic', '-lflint-arb', '-lflint', '-lgmp', '-lmpfr'];
    if (works('gcc', ['-O2', '-o', `${build}peer-${name}`, `${sources}${name}.c`, ...libraries]))
      out.push(name);
  }
  if (works('gp', ['--version-short'])) out.push('pari');
  if (existsSync('/usr/bin/python3') && works('/usr/bin/python3', ['-c', 'import sympy']))
    out.push('sympy');
  return out;
}

interface Run {
  seconds: number;
  answers: string;
}

function command(
  peer: PeerName,
  task: string,
  folder: string,
  times: number,
): { file: string; args: string[]; input: string } {
  const path = `${folder}${task}.slp`;
  if (peer === 'pari') {
    return {
      file: 'gp',
      args: ['-q', '-f', '-D', 'parisizemax=2000000000'],
      input: `FILE="${path}"; TASK="${task}"; TIMES=${times};\nread("${sources}tower.gp");\n`,
    };
  }
  if (peer === 'sympy') {
    return {
      file: '/usr/bin/python3',
      args: [`${sources}sympy-peer.py`, path, String(times)],
      input: '',
    };
  }
  return { file: `${build}peer-${peer}`, args: [path, String(times)], input: '' };
}

function runOnce(
  peer: PeerName,
  task: string,
  folder: string,
  times: number,
  seconds: number,
): Run[] | null {
  const { file, args, input } = command(peer, task, folder, times);
  try {
    const out = execFileSync(file, args, {
      input,
      encoding: 'utf8',
      timeout: seconds * 1000,
      killSignal: 'SIGKILL',
      stdio: ['pipe', 'pipe', 'ignore'],
      maxBuffer: 1 << 26,
    });
    return out
      .split('\n')
      .filter((l) => l.startsWith('{'))
      .map((l) => JSON.parse(l) as Run);
  } catch {
    return null;
  }
}

/** One run under the limit, then as many as fit into a few seconds. */
export function runPeer(peer: PeerName, task: string, folder: string, seconds: number): Measured {
  const first = runOnce(peer, task, folder, 1, seconds)?.[0];
  if (first === undefined) return { ms: null, note: `> ${seconds} s`, exact: false };
  const exact = !/unknown|refused|no formula/.test(first.answers);
  const times = Math.min(51, Math.floor(5 / Math.max(first.seconds, 0.01)));
  const runs = times < 2 ? [first] : (runOnce(peer, task, folder, times, seconds) ?? [first]);
  const sorted = runs.map((r) => r.seconds * 1000).sort((a, b) => a - b);
  const ms = sorted[Math.floor(sorted.length / 2)] as number;
  // PARI's way with near-ties is numeric, with a bound that proves the sign: told, but not counted as an exact peer.
  if (peer === 'pari' && task.startsWith('T7'))
    return { ms, note: `${ms.toFixed(3)} num`, exact: false };
  return { ms, note: exact ? null : 'undecided', exact };
}
