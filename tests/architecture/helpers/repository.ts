import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** Top folder of the repository. */
export const root = fileURLToPath(new URL('../../..', import.meta.url));

const NOT_OURS = new Set(['node_modules', 'dist', 'coverage', '.git', '__pycache__', '.pytest_cache', '__snapshots__']);

/** Every file of ours under a folder, as paths from the top with forward slashes, sorted. */
function listFiles(folder: string): string[] {
  return readdirSync(join(root, folder), { withFileTypes: true })
    .filter((entry) => !NOT_OURS.has(entry.name))
    .flatMap((entry) => {
      const path = `${folder}/${entry.name}`;
      return entry.isDirectory() ? listFiles(path) : [path];
    })
    .sort();
}

/** Every source and test file of the project. */
export function listCode(): string[] {
  return ['packages', 'apps', 'tests'].flatMap(listFiles).filter((path) => /\.([cm]?[jt]sx?|py)$/.test(path));
}

export function readText(path: string): string {
  return readFileSync(join(root, path), 'utf8');
}
