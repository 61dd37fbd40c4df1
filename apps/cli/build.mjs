import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  renameSync,
  unlinkSync,
  writeFileSync,
} from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { bundleProcess } from '../../packages/sandbox/build.mjs';

const folder = fileURLToPath(new URL('.', import.meta.url));
const dist = join(folder, 'dist');
const sandboxFolder = join(folder, '../../packages/sandbox');

/** Commander is CommonJS and asks for Node's own modules through require. */
const BANNER =
  "import { createRequire as thalwegRequire } from 'node:module'; const require = thalwegRequire(import.meta.url);";

/** Lists of names that come without a licence text. */
const NO_TEXT = {
  'spdx-exceptions': 'Licensed under https://creativecommons.org/licenses/by/3.0/ by The Linux Foundation.',
  'spdx-license-ids': 'Dedicated to the public domain: https://creativecommons.org/publicdomain/zero/1.0/',
};

try {
  const command = await bundle();
  const sandbox = await bundleProcess();
  const beside = sandbox.outputFiles.map(({ path, contents }) => ({ path: join(dist, basename(path)), contents }));
  write([...command.outputFiles, ...beside]);
  writeFileSync(
    join(dist, 'THIRD-PARTY-LICENSES.txt'),
    licences([...inputs(command), ...inputs(sandbox, sandboxFolder)]),
  );
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
    // A reader of configuration files inside asks for it only where there is one in TypeScript.
    external: ['typescript'],
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

/** What a bundle was made of, as whole paths. */
function inputs({ metafile }, base = folder) {
  return Object.keys(metafile.inputs).map((path) => join(base, path));
}

/** Licence texts of the packages that ended up inside, as their licences ask for. */
function licences(paths) {
  const folders = new Set(paths.map((path) => /^.*node_modules\/(?:@[^/]+\/)?[^/]+/.exec(path)?.[0]));
  folders.delete(undefined);
  return [...folders]
    .sort()
    .map((packageFolder) => {
      const { name, version, license } = JSON.parse(readFileSync(join(packageFolder, 'package.json'), 'utf8'));
      const text = licenceFile(packageFolder) ?? licenceSection(packageFolder) ?? NO_TEXT[name];
      if (text === undefined) throw new Error(`${name} has no licence text: add it here`);
      return `${name} ${version} (${license})\n\n${text}\n`;
    })
    .join(`\n${'-'.repeat(72)}\n\n`);
}

function licenceFile(packageFolder) {
  const file = readdirSync(packageFolder).find((entry) => /^licen[cs]e/i.test(entry));
  return file && readFileSync(join(packageFolder, file), 'utf8').trim();
}

/** What a README says under the heading "License", where it begins with a copyright or a licence's name. */
function licenceSection(packageFolder) {
  const readme = join(packageFolder, 'README.md');
  const text = existsSync(readme) ? readFileSync(readme, 'utf8') : '';
  return /^#+ licen[cs]e\s+((?:The MIT License|Copyright)[^]*)$/im.exec(text)?.[1].trim();
}
