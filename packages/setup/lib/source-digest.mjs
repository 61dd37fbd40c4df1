import { createHash } from 'node:crypto';
import { readFileSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';

const SOURCES = [
  'package-lock.json',
  'tsconfig.base.json',
  'packages/core/package.json',
  'packages/core/src',
  'packages/format/package.json',
  'packages/format/src',
  'apps/cli/package.json',
  'apps/cli/build.mjs',
  'apps/cli/src',
];

/** Digest of everything that the command-line bundle is made of; equal digests mean that nothing needs building. */
export function sourceDigest(folder = root) {
  const hash = createHash('sha256');
  for (const path of SOURCES.flatMap((source) => listFiles(folder, source))) {
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
