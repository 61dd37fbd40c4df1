import { copyFileSync, mkdirSync, readFileSync, readdirSync, renameSync, unlinkSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const folder = fileURLToPath(new URL('.', import.meta.url));
const dist = join(folder, 'dist');

/** Commander is CommonJS and asks for Node's own modules through require. */
const BANNER =
  "import { createRequire as thalwegRequire } from 'node:module'; const require = thalwegRequire(import.meta.url);";

try {
  const { outputFiles, metafile } = await bundle();
  write(outputFiles);
  writeFileSync(join(dist, 'THIRD-PARTY-LICENSES.txt'), licences(Object.keys(metafile.inputs)));
} catch (error) {
  if (!Array.isArray(error.errors)) throw error;
  process.exitCode = 1; // esbuild has already said why
}

/** Bundles the command line with every package inside, split so that a verb loads only its own part. */
function bundle() {
  return build({
    absWorkingDir: folder,
    entryPoints: { thalweg: 'src/bin.ts', worker: 'src/compute/worker.ts' },
    outdir: dist,
    chunkNames: 'chunk-[hash]',
    bundle: true,
    splitting: true,
    write: false,
    format: 'esm',
    platform: 'node',
    target: 'node20.19',
    conditions: ['source'],
    minifySyntax: true,
    minifyWhitespace: true,
    legalComments: 'none',
    logLevel: 'error',
    banner: { js: BANNER },
    metafile: true,
  });
}

/**
 * Chunks carry a hash in their names and are written first; entries are renamed into place, so that a command started
 * meanwhile never meets a half-written one.
 */
function write(files) {
  mkdirSync(dist, { recursive: true });
  const isEntry = (file) => !basename(file.path).startsWith('chunk-');
  for (const file of files.toSorted((a, b) => Number(isEntry(a)) - Number(isEntry(b)))) {
    const partial = `${file.path}.${process.pid}.partial`;
    writeFileSync(partial, file.contents);
    renameSync(partial, file.path);
  }
  const current = new Set(files.map((file) => basename(file.path)));
  for (const name of readdirSync(dist)) {
    if (/^chunk-.*\.(js|txt)$/.test(name) && !current.has(name)) unlinkSync(join(dist, name));
  }
  copyFileSync(join(folder, '../../LICENSE'), join(folder, 'LICENSE'));
}

/** Licence texts of the packages that ended up inside, as their licences ask for. */
function licences(inputs) {
  const folders = new Set(inputs.map((path) => /^.*node_modules\/(?:@[^/]+\/)?[^/]+/.exec(path)?.[0]));
  folders.delete(undefined);
  return [...folders]
    .sort()
    .map((path) => {
      const packageFolder = join(folder, path);
      const { name, version, license } = JSON.parse(readFileSync(join(packageFolder, 'package.json'), 'utf8'));
      const file = readdirSync(packageFolder).find((entry) => /^licen[cs]e/i.test(entry));
      if (file === undefined) throw new Error(`${name} has no licence file: add its text here`);
      return `${name} ${version} (${license})\n\n${readFileSync(join(packageFolder, file), 'utf8').trim()}\n`;
    })
    .join(`\n${'-'.repeat(72)}\n\n`);
}
