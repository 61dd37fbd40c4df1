import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { withLock } from './lock.mjs';
import { root } from './paths.mjs';
import { capture, run } from './run.mjs';
import { sourceDigest } from './source-digest.mjs';

const stampPath = join(root, 'apps/cli/dist/.sources');

/** What is bundled: the scripts of the sandbox, which tests and bundlers use, and the command line, which brings its own copy. */
const BUNDLES = [
  {
    what: 'The sandbox',
    script: 'packages/sandbox/build.mjs',
    output: 'packages/sandbox/dist/bundle/sandbox-process.js',
  },
  { what: 'The command line', script: 'apps/cli/build.mjs', output: 'apps/cli/dist/thalweg.js' },
  { what: 'The registry', script: 'apps/registry/build.mjs', output: 'apps/registry/dist/registry.js' },
];

/** Builds every bundle when the sources changed since the last build. Throws with the bundler's messages on failure. */
export function ensureBundle() {
  return withLock(async () => {
    const digest = sourceDigest();
    if (isBuilt(digest)) return;
    for (const { what, script } of BUNDLES) {
      const { code, output } = await capture(process.execPath, [join(root, script)]);
      if (code !== 0) throw new Error(`${what} could not be built:\n${output}`);
    }
    writeFileSync(stampPath, `${digest}\n`);
  });
}

/** Type-checks every project of tsconfig.json, incrementally; resolves to the compiler's exit code. */
export function checkTypes({ quiet = false } = {}) {
  const compiler = [join(root, 'node_modules/typescript/bin/tsc'), '-b'];
  return withLock(async () =>
    quiet ? capture(process.execPath, compiler) : { code: await run(process.execPath, compiler), output: '' },
  );
}

function isBuilt(digest) {
  return (
    BUNDLES.every(({ output }) => existsSync(join(root, output))) &&
    existsSync(stampPath) &&
    readFileSync(stampPath, 'utf8').trim() === digest
  );
}
