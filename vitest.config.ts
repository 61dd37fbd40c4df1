import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const source = (path: string) => `${root}${path}`;

const TESTS = [
  'packages/*/test/**/*.test.ts',
  'apps/*/test/**/*.test.ts',
  'tests/**/*.test.ts',
  'packages/setup/test/**/*.test.mjs',
];

const DATABASE_TESTS = ['apps/*/test/**/*.db.test.ts', 'tests/**/*.db.test.ts'];

/**
 * Tests run against the sources: packages are resolved to src, so no build is needed for the pure tier. PostgreSQL starts only
 * for tests that need it.
 */
export default defineConfig({
  resolve: {
    alias: [
      { find: /^@thalweg\/(core|format|pictures|sandbox)$/, replacement: source('packages/$1/src/index.ts') },
      { find: /^@thalweg\/(core|format|sandbox)\/(\w+)$/, replacement: source('packages/$1/src/$2/index.ts') },
    ],
  },
  test: {
    testTimeout: 60_000,
    hookTimeout: 60_000,
    projects: [
      { extends: true, test: { name: 'plain', include: TESTS, exclude: DATABASE_TESTS } },
      {
        extends: true,
        test: { name: 'database', include: DATABASE_TESTS, globalSetup: 'tests/support/start-database.ts' },
      },
    ],
  },
});
