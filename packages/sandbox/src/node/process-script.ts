import { existsSync } from 'node:fs';
import { ThalwegError } from '@thalweg/core';

/** Beside the bundle that this module is part of, or where build.mjs of this package puts it. */
const PLACES = ['./sandbox-process.js', '../../dist/bundle/sandbox-process.js'];

/** The script of the sandbox's process. Throws `internal` when it was not built. */
export function processScript(): URL {
  const script = PLACES.map((place) => new URL(place, import.meta.url)).find((url) => existsSync(url));
  if (script !== undefined) return script;
  throw new ThalwegError(
    'internal',
    'expected the script of the sandbox to be built, it is not there; run npm run build',
  );
}
