import { findProgram, run, say, SetupError } from './run-command.mjs';

/** What the product runs on: Debian package → a program that shows it is there. */
export const SERVER_PACKAGES = {
  'mariadb-server-core': 'mariadbd',
  'mariadb-client': 'mariadb-admin',
};

/** What the tests need besides. */
export const TEST_PACKAGES = {
  chromium: 'chromium',
  'texlive-latex-base': 'pdflatex',
  'poppler-utils': 'pdftotext',
};

/**
 * Installs the packages whose program is missing. None of them brings a system service.
 * Where that cannot be done, stops with one line that says what to install.
 */
export async function ensureDebianPackages(packages) {
  const missing = Object.keys(packages).filter((name) => findProgram(packages[name]) === null);
  if (missing.length === 0) return;
  const apt = findProgram('apt-get');
  const list = missing.join(' ');
  if (apt === null) {
    const programs = missing.map((name) => packages[name]).join(', ');
    throw new SetupError(`please install ${programs} (on Debian: apt-get install ${list}).`);
  }
  const command = `apt-get install --no-install-recommends ${list}`;
  if (process.getuid?.() !== 0) {
    throw new SetupError(`please have an administrator run: ${command}`);
  }
  say(`installing from Debian: ${list} …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  await run(apt, ['update', '-q'], { env });
  await run(apt, ['install', '-y', '-q', '--no-install-recommends', ...missing], { env });
  const still = missing.filter((name) => findProgram(packages[name]) === null);
  if (still.length > 0) throw new SetupError(`${still.join(' ')} did not bring its program.`);
}
