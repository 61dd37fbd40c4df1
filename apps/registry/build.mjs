import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const folder = fileURLToPath(new URL('.', import.meta.url));
const { dependencies } = JSON.parse(readFileSync(new URL('package.json', import.meta.url), 'utf8'));

/** Bundles the server with the packages of this repository and the migrations inside; npm's packages stay outside. */
await build({
  absWorkingDir: folder,
  entryPoints: { registry: 'src/bin.ts' },
  outdir: 'dist',
  bundle: true,
  format: 'esm',
  platform: 'node',
  target: 'node20.19',
  conditions: ['source'],
  external: Object.keys(dependencies).filter((name) => !name.startsWith('@thalweg/')),
  banner: {
    js: "import { createRequire as thalwegRequire } from 'node:module'; const require = thalwegRequire(import.meta.url);",
  },
  legalComments: 'none',
  logLevel: 'error',
}).catch(() => {
  process.exitCode = 1; // esbuild has already said why
});
