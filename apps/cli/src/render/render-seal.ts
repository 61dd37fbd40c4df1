import type { SealDocument } from '../verbs/seal/effect.js';
import type { Layout } from './layout.js';

/** What was sealed: the files with their sizes, the archive and its digest. */
export function renderSeal({ name, version, title, digest, bytes, path, files }: SealDocument, layout: Layout): string {
  const { colours } = layout;
  const rows = [...files.map((file) => [file.name, file.bytes] as const), ['in all', bytes] as const];
  const width = Math.max(...rows.map(([label]) => label.length));
  const digits = Math.max(...rows.map(([, size]) => String(size).length));
  const lines = rows.map(([label, size]) => `  ${label.padEnd(width)}  ${String(size).padStart(digits)} bytes`);
  return [
    `  ${colours.bold(`${name} ${version}`)}  ${title}`,
    '',
    ...lines,
    '',
    `  sha256   ${colours.bold(digest)}`,
    `  archive  ${path}`,
    '',
  ].join('\n');
}
