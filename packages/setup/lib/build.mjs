import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { withLock } from './lock.mjs';
import { root } from './paths.mjs';
import { capture, run } from './run.mjs';
import { sourceDigest } from './source-digest.mjs';

const stampPath = join(root, 'apps/cli/dist/.sources');

/** Builds apps/cli/dist when the sources changed since the last build. Throws with the bundler's messages on failure. */
export function ensureBundle() {
  return withLock(async () => {
    const digest = sourceDigest();
    if (isBuilt(digest)) return;
    const { code, output } = await capture(process.execPath, [join(root, 'apps/cli/build.mjs')]);
    if (code !== 0) throw new Error(`The command line could not be built:\n${output}`);
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
    existsSync(join(root, 'apps/cli/dist/thalweg.js')) &&
    existsSync(stampPath) &&
    readFileSync(stampPath, 'utf8').trim() === digest
  );
}
