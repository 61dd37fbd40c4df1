import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const PYTHON = '/usr/bin/python3';

/** Runs a script of this folder's neighbours with NumPy and SciPy and returns its output; fails with what to install. */
export function runPython(script: URL, args: readonly string[]): string {
  const { error, status, stdout, stderr } = spawnSync(PYTHON, [fileURLToPath(script), ...args], { encoding: 'utf8' });
  if (error || /ModuleNotFoundError/.test(stderr)) {
    const reason = error?.message ?? stderr.trim().split('\n').at(-1);
    throw new Error(
      `expected ${PYTHON} with NumPy and SciPy, got: ${reason}. Install python3, python3-numpy and python3-scipy.`,
    );
  }
  if (status !== 0) throw new Error(`${fileURLToPath(script)} ended with status ${status}:\n${stderr}`);
  return stdout;
}
