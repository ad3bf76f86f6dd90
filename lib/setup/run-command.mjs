import { spawn } from 'node:child_process';
import { accessSync, constants, readFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';

/** A fault that is told to the person in one line, without a stack of calls. */
export class SetupError extends Error {}

/** One line of progress. */
export function say(line) {
  process.stdout.write(`surdwork: ${line}\n`);
}

/** Full path of a program, looked for in PATH and in the system folders PATH may leave out; or null. */
export function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(delimiter), '/usr/sbin', '/usr/bin', '/sbin'];
  for (const folder of folders) {
    const path = join(folder, name);
    try {
      accessSync(path, constants.X_OK);
      return path;
    } catch {
      continue;
    }
  }
  return null;
}

const running = new Set();

/** Ends the programs that `run` still waits for. */
export function endRunning() {
  for (const child of running) child.kill('SIGTERM');
}

/**
 * Runs a program to its end. Its output is held back, and part of the error when it fails; with
 * `show` it goes to the terminal instead.
 * @returns {Promise<string>} standard output, empty with `show`
 */
export function run(program, args, { show = false, input, ...options } = {}) {
  const stdin = input === undefined ? 'ignore' : 'pipe';
  const stdio = show ? [stdin, 'inherit', 'inherit'] : [stdin, 'pipe', 'pipe'];
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { ...options, stdio });
    running.add(child);
    let output = '';
    let all = '';
    child.stdout?.on('data', (chunk) => {
      output += chunk;
      all += chunk;
    });
    child.stderr?.on('data', (chunk) => {
      all += chunk;
    });
    child.stdin?.end(input);
    child.on('error', reject);
    child.on('close', (code, signal) => {
      running.delete(child);
      if (code === 0) return resolve(output);
      const tail = all.trim().split('\n').slice(-25).join('\n');
      reject(new SetupError(`${program} ${args.join(' ')} ended with ${code ?? signal}\n${tail}`));
    });
  });
}

/** Whether a process with this id runs; one that has ended but was not yet collected does not. */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    return error.code === 'EPERM';
  }
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return !stat.slice(stat.lastIndexOf(')')).startsWith(') Z');
  } catch {
    return true;
  }
}

/** Whether the process runs and its command line holds `word`: not a later one with the same number. */
export function isProcessOf(pid, word) {
  if (!Number.isInteger(pid) || !isAlive(pid)) return false;
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(word);
  } catch {
    return true;
  }
}

/** Waits until `ready` answers true; false when `seconds` pass first. */
export async function waitUntil(ready, seconds, everyMs = 100) {
  const end = Date.now() + seconds * 1000;
  for (;;) {
    if (await ready()) return true;
    if (Date.now() > end) return false;
    await new Promise((resolve) => setTimeout(resolve, everyMs));
  }
}
