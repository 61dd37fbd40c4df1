import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';

const BUILD_SCRIPTS = ['apps/cli/build.mjs', 'apps/registry/build.mjs', 'packages/sandbox/build.mjs'];

/** Digest of everything that the bundles are made of; equal digests mean that nothing needs building. */
export function sourceDigest(folder = root) {
  const packages = readdirSync(join(folder, 'packages')).map((name) => `packages/${name}`);
  const parts = [...packages.sort(), 'apps/cli', 'apps/registry'].flatMap((path) => [
    `${path}/package.json`,
    `${path}/src`,
  ]);
  const sources = ['package-lock.json', ...BUILD_SCRIPTS, 'migrations', ...parts].filter((path) =>
    existsSync(join(folder, path)),
  );
  const hash = createHash('sha256');
  for (const path of sources.flatMap((source) => listFiles(folder, source))) {
    hash
      .update(`${path}\0`)
      .update(readFileSync(join(folder, path)))
      .update('\0');
  }
  return hash.digest('hex');
}

function listFiles(folder, path) {
  if (!statSync(join(folder, path)).isDirectory()) return [path];
  return readdirSync(join(folder, path))
    .sort()
    .flatMap((name) => listFiles(folder, `${path}/${name}`));
}
