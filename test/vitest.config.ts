import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** The same tests run deeper (more sequences, all sizes) in `npm run test:deep`, which sets DEEP=1. */
const deep = process.env['DEEP'] === '1';

/**
 * One project a gate of `npm test`. `npx vitest run --config test/vitest.config.ts shared/floor` runs what matches the
 * path; the throw-away database is started only for projects that need it.
 */
export default defineConfig({
  root: fileURLToPath(new URL('..', import.meta.url)),
  resolve: {
    // Node loads graphql's CommonJS file for packages, Vite its module for our code: two copies, "another realm" errors.
    alias: [{ find: /^graphql$/, replacement: 'graphql/index.js' }],
  },
  test: {
    testTimeout: deep ? 600_000 : 30_000,
    hookTimeout: 120_000,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['shared/**/*.spec.ts', 'server/**/*.spec.ts', 'drizzle/**/*.spec.ts'],
          exclude: ['**/*.api.spec.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          include: ['test/api/**/*.spec.ts', 'server/**/*.api.spec.ts'],
          globalSetup: ['test/database-setup.ts'],
        },
      },
      { extends: true, test: { name: 'outside', include: ['test/outside/**/*.spec.ts'] } },
      {
        extends: true,
        test: { name: 'tidy', include: ['test/tidy/**/*.spec.ts', 'test/gates/**/*.spec.ts'] },
      },
      {
        extends: true,
        test: {
          name: 'migrations',
          include: ['test/migrations/**/*.spec.ts'],
          globalSetup: ['test/database-setup.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['test/e2e/**/*.spec.ts'],
          globalSetup: ['test/database-setup.ts', 'test/e2e/server-setup.ts'],
          fileParallelism: false,
          testTimeout: deep ? 600_000 : 90_000,
        },
      },
    ],
  },
});
