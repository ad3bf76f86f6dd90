import { join } from 'node:path';
import { readState, remember } from './state.mjs';
import { run } from './run-command.mjs';

/**
 * Checks the environment, brings the database's structure up to date and puts the demo in or takes
 * its passwords away, in a process of its own, because those parts are TypeScript.
 * @returns what was done: `{ migrated, demo }`
 */
export async function prepareDatabase(root, folder, env) {
  const output = await run(
    process.execPath,
    ['--conditions=react-server', '--import', 'tsx', join(root, 'db', 'prepare.ts')],
    { cwd: root, env },
  );
  const done = JSON.parse(output.trim().split('\n').at(-1));
  if (done.demo?.linkToken !== undefined) remember(folder, { demoLinkToken: done.demo.linkToken });
  return { ...done, linkToken: readState(folder).demoLinkToken };
}
