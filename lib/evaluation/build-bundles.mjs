import { ensureBundles } from './bundles.mjs';

await ensureBundles({ force: true });
