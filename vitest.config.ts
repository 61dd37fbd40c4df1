import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const source = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** Tests run against the sources: packages are resolved to src, so no build is needed for the pure tier. */
export default defineConfig({
  resolve: {
    alias: {
      '@thalweg/core': source('packages/core/src/index.ts'),
      '@thalweg/format': source('packages/format/src/index.ts'),
    },
  },
  test: {
    include: ['packages/*/test/**/*.test.ts', 'apps/*/test/**/*.test.ts', 'tests/**/*.test.ts'],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    benchmark: { include: ['tests/bench/**/*.bench.ts', 'packages/*/bench/**/*.bench.ts'] },
  },
});
