import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const folder = fileURLToPath(new URL('../..', import.meta.url));
const SCRIPTS = ['dist/bundle/sandbox-process.js', 'dist/bundle/sandbox-worker.js'];

/** Builds the scripts of process and worker when a source is newer. They are renamed into place, so that nothing needs a lock. */
export function ensureScripts(): void {
  const built = SCRIPTS.map((name) => join(folder, name));
  const sources = readdirSync(join(folder, 'src'), { recursive: true, encoding: 'utf8' });
  const newest = [...sources.map((name) => `src/${name}`), 'build.mjs'].map((name) => changed(join(folder, name)));
  if (built.every(existsSync) && Math.max(...newest) < Math.min(...built.map(changed))) return;
  execFileSync(process.execPath, [join(folder, 'build.mjs')]);
}

function changed(path: string): number {
  return statSync(path).mtimeMs;
}
