import { mkdirSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';

const folder = fileURLToPath(new URL('.', import.meta.url));
const common = {
  absWorkingDir: folder,
  bundle: true,
  write: false,
  legalComments: 'none',
  logLevel: 'error',
  conditions: ['source'],
};

/** The module that the interpreter loads before a generator; it exports the function `generate`. */
export async function bundleInside() {
  const { outputFiles } = await build({
    ...common,
    entryPoints: ['src/inside/index.ts'],
    format: 'esm',
    target: 'es2023',
    minify: true,
  });
  return outputFiles[0].text;
}

/** The script of the sandbox's process in Node.js, one file with everything inside; also names what went into it. */
export async function bundleProcess() {
  return bundleHost({
    entryPoints: { 'sandbox-process': 'src/node/process.ts' },
    platform: 'node',
    target: 'node20.19',
  });
}

/** The script of the web worker, one file with everything inside. */
async function bundleWorker() {
  return bundleHost({
    entryPoints: { 'sandbox-worker': 'src/browser/worker.ts' },
    platform: 'browser',
    target: 'es2023',
  });
}

async function bundleHost(options) {
  return build({
    ...common,
    ...options,
    outdir: 'dist/bundle',
    format: 'esm',
    minifySyntax: true,
    minifyWhitespace: true,
    loader: { '.wasm': 'binary' },
    define: { SANDBOX_INSIDE: JSON.stringify(await bundleInside()) },
    metafile: true,
  });
}

async function main() {
  mkdirSync(join(folder, 'dist/bundle'), { recursive: true });
  for (const { outputFiles } of [await bundleProcess(), await bundleWorker()]) {
    for (const { path, contents } of outputFiles) {
      const partial = `${path}.${process.pid}.partial`;
      writeFileSync(partial, contents);
      renameSync(partial, path);
    }
  }
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  try {
    await main();
  } catch (error) {
    if (!Array.isArray(error.errors)) throw error;
    process.exitCode = 1; // esbuild has already said why
  }
}
