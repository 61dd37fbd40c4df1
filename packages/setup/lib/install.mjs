import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { withLock } from './lock.mjs';
import { root } from './paths.mjs';
import { runNpm } from './run.mjs';

/** Installs the locked packages when some are missing or of another version. Throws when npm fails. */
export function ensureInstalled() {
  return withLock(async () => {
    if (isInstalled()) return;
    process.stderr.write('Installing packages (npm ci).\n');
    const code = await runNpm(['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error']);
    if (code !== 0) throw new Error(`npm ci ended with exit code ${code}. See its messages above.`);
  });
}

/**
 * Compares package-lock.json with the record that npm leaves in node_modules: every package that is not optional must
 * be there in the same version. Works however the packages were installed.
 */
export function isInstalled(folder = root) {
  const wanted = readPackages(join(folder, 'package-lock.json'));
  const present = readPackages(join(folder, 'node_modules', '.package-lock.json'));
  if (wanted === null) throw new Error('package-lock.json is missing or not JSON: restore it from version control.');
  if (present === null) return false;
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === '' || entry.optional || entry.peerOptional || entry.devOptional) return true;
    const found = present[path];
    return found !== undefined && found.version === entry.version && found.link === entry.link;
  });
}

function readPackages(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8')).packages;
  } catch {
    return null;
  }
}
