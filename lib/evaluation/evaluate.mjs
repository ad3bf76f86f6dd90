import { ensureBundles } from './bundles.mjs';

const bundles = await ensureBundles();
await import(bundles['command-line']);
