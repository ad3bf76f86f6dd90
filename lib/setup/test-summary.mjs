import { existsSync, readFileSync } from 'node:fs';
import { relative } from 'node:path';

/**
 * Reads vitest's JSON report.
 * @returns `{ passed, failed, left, folders }`: counts of tests, `left` being those that did not
 *   run, and the number that ran by folder of `tests/`;
 *   null when there is no report
 */
export function readReport(path, root) {
  if (!existsSync(path)) return null;
  const report = JSON.parse(readFileSync(path, 'utf8'));
  const folders = new Map();
  for (const file of report.testResults) {
    const [, folder] = relative(root, file.name).split('/');
    folders.set(folder, (folders.get(folder) ?? 0) + file.assertionResults.length);
  }
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests,
    left: report.numPendingTests + report.numTodoTests,
    folders: [...folders].sort(([a], [b]) => a.localeCompare(b)),
  };
}

/** The closing lines: each step with its outcome and time, then the counts. */
export function summaryLines(steps, report) {
  const lines = ['', 'Summary'];
  for (const { name, fault, seconds } of steps) {
    const outcome = fault === null ? 'passed' : 'FAILED';
    lines.push(`  ${name.padEnd(12)} ${outcome}  ${seconds.toFixed(1).padStart(6)} s`);
  }
  if (report !== null) {
    const { passed, failed, left, folders } = report;
    lines.push(`  ${passed} tests passed, ${failed} failed, ${left} did not run`);
    lines.push(`  by folder: ${folders.map(([name, n]) => `${name} ${n}`).join(', ')}`);
  }
  return lines;
}
