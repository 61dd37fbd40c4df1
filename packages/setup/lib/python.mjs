import { setTimeout as sleep } from 'node:timers/promises';
import { capture, run } from './run.mjs';

const PYTHON = '/usr/bin/python3';
const DEBIAN_PACKAGES = ['python3-numpy', 'python3-scipy', 'python3-cvxopt'];
const APT_ATTEMPTS = 5;
const APT_PAUSE_MILLISECONDS = 5000;

/** Makes sure that the reference programs of tests/reference can run; installs them where it may. */
export async function ensurePython() {
  if (await hasLibraries()) return;
  const wanted = DEBIAN_PACKAGES.join(' ');
  const advice = `The tests compare with NumPy, SciPy and CVXOPT for ${PYTHON}. Install them: apt-get install ${wanted}`;
  if (process.getuid?.() !== 0) throw new Error(`${advice} (needs root; you are not root), then run npm test again.`);
  process.stderr.write(`Installing ${wanted} (apt-get).\n`);
  await apt(['update']);
  await apt(['install', '-y', '--no-install-recommends', ...DEBIAN_PACKAGES]);
  if (!(await hasLibraries())) throw new Error(`${advice}; apt-get did not make them importable.`);
}

async function hasLibraries() {
  const probe = await capture(PYTHON, ['-c', 'import numpy.linalg, scipy.linalg, cvxopt']).catch(() => ({ code: 127 }));
  return probe.code === 0;
}

/** apt-get refuses at once while another run holds its lists, so a few attempts are made. */
async function apt(args) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  for (let attempt = 1; ; attempt += 1) {
    const code = await run('apt-get', ['-q', '-o', 'DPkg::Lock::Timeout=300', ...args], {
      env,
      stdio: ['ignore', 2, 2],
    }).catch((error) => {
      if (error.code === 'ENOENT')
        throw new Error('apt-get is not here: install NumPy, SciPy and CVXOPT for ' + PYTHON + '.');
      throw error;
    });
    if (code === 0) return;
    if (attempt === APT_ATTEMPTS) throw new Error(`apt-get ${args.join(' ')} ended with exit code ${code}.`);
    await sleep(APT_PAUSE_MILLISECONDS);
  }
}
