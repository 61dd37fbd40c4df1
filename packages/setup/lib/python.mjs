import { ensureDebianPackages } from './debian.mjs';
import { capture } from './run.mjs';

const PYTHON = '/usr/bin/python3';
const DEBIAN_PACKAGES = ['python3-numpy', 'python3-scipy', 'python3-cvxopt'];

/** Makes sure that the reference programs of tests/reference can run; installs them where it may. */
export function ensurePython() {
  return ensureDebianPackages(DEBIAN_PACKAGES, {
    isPresent: hasLibraries,
    purpose: `The tests compare with NumPy, SciPy and CVXOPT for ${PYTHON}.`,
  });
}

async function hasLibraries() {
  const probe = await capture(PYTHON, ['-c', 'import numpy.linalg, scipy.linalg, cvxopt']).catch(() => ({ code: 127 }));
  return probe.code === 0;
}
