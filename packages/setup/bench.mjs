import { existsSync, mkdirSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';
import { root } from './lib/paths.mjs';
import { run } from './lib/run.mjs';

const FOLDERS = [
  'packages/core/bench',
  'packages/format/bench',
  'packages/sandbox/bench',
  'apps/cli/bench',
  'tests/bench',
];

/** Runs every timing script, or those whose path holds one of the given words, one after another. */
await main(async (words) => {
  await ensureInstalled();
  const scripts = findScripts().filter((path) => words.length === 0 || words.some((word) => path.includes(word)));
  if (scripts.length === 0) throw new Error(`expected the name of a timing script, one of ${findScripts().join(', ')}`);
  for (const script of scripts) {
    process.stdout.write(`\n${script}\n`);
    const code = await run(process.execPath, [await bundle(script)]);
    if (code !== 0) return code;
  }
  return 0;
});

function findScripts() {
  return FOLDERS.filter((folder) => existsSync(join(root, folder))).flatMap((folder) =>
    readdirSync(join(root, folder))
      .filter((name) => name.endsWith('.ts'))
      .sort()
      .map((name) => `${folder}/${name}`),
  );
}

async function bundle(script) {
  const { build } = await import('esbuild');
  const folder = join(root, 'node_modules/.cache/thalweg/bench');
  mkdirSync(folder, { recursive: true });
  const outfile = join(folder, script.replaceAll('/', '-').replace(/\.ts$/, '.mjs'));
  const settings = { bundle: true, format: 'esm', platform: 'node', conditions: ['source'], logLevel: 'error' };
  await build({ absWorkingDir: root, entryPoints: [script], outfile, ...settings });
  return outfile;
}
