import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));
const alias = {
  '@': root.replace(/\/$/, ''),
  'server-only': fileURLToPath(new URL('./setup/server-only.ts', import.meta.url)),
};

/** Folders whose files share one real MariaDB, so they run one after another. */
const onDatabase = ['db', 'accounts', 'access', 'mail', 'notebooks', 'workshops'];
const inFolders = (folders: string[]) => folders.map((folder) => `tests/${folder}/**/*.test.ts`);
const elsewhere = ['tests/components/**', 'tests/browser/**', 'tests/api/**'];

export default defineConfig({
  resolve: { alias },
  test: {
    root,
    dir: root,
    projects: [
      {
        extends: true,
        test: {
          name: 'node',
          include: ['tests/**/*.test.{ts,mjs}'],
          exclude: [...elsewhere, ...inFolders(onDatabase)],
          setupFiles: ['tests/setup/seed.ts'],
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        plugins: [react()],
        test: {
          name: 'components',
          environment: 'jsdom',
          include: ['tests/components/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/setup/seed.ts', 'tests/setup/components.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'database',
          include: inFolders(onDatabase),
          setupFiles: ['tests/setup/seed.ts'],
          globalSetup: ['tests/setup/database.mjs'],
          fileParallelism: false,
          testTimeout: 60_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: 'served',
          include: ['tests/api/**/*.test.ts', 'tests/browser/**/*.test.ts'],
          setupFiles: ['tests/setup/seed.ts'],
          globalSetup: ['tests/setup/served.ts'],
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 2 },
        },
      },
    ],
  },
});
