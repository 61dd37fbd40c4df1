import { fileURLToPath } from 'node:url';
import { execa, type Options } from 'execa';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';

const bin = fileURLToPath(new URL('../../bin/thalweg.js', import.meta.url));

/** Environment without anything that changes colours or widths. */
export const plainEnvironment = { PATH: process.env.PATH, HOME: process.env.HOME };

/** Runs the built command as a person would; never rejects, so that tests look at exit code and streams. */
export async function thalweg(args: readonly string[], options: Options = {}) {
  await ensureBundle();
  return startThalweg(args, options);
}

/** The same, started at once: for tests that talk to the running process. The bundle must be there. */
export function startThalweg(args: readonly string[], options: Options = {}) {
  return execa(process.execPath, [bin, ...args], {
    reject: false,
    extendEnv: false,
    env: plainEnvironment,
    stripFinalNewline: false,
    ...options,
  });
}
