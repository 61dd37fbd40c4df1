import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const source = (path: string) => `${root}${path}`;

/** Tests run against the sources: packages are resolved to src, so no build is needed for the pure tier. */
export default defineConfig({
  resolve: {
    alias: [
      { find: /^@thalweg\/(core|format)$/, replacement: source('packages/$1/src/index.ts') },
      { find: /^@thalweg\/(core|format)\/(\w+)$/, replacement: source('packages/$1/src/$2/index.ts') },
    ],
  },
  test: {
    include: [
      'packages/*/test/**/*.test.ts',
      'apps/*/test/**/*.test.ts',
      'tests/**/*.test.ts',
      'packages/setup/test/**/*.test.mjs',
    ],
    testTimeout: 60_000,
    hookTimeout: 60_000,
  },
});
