import fc from 'fast-check';

/** The same operands on every run in CI; elsewhere a new seed each time, printed by a failure. */
const seed = process.env.CI === undefined ? Date.now() % 2_147_483_647 : 17_257;
fc.configureGlobal({ ...fc.readConfigureGlobal(), seed });
