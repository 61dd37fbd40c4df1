import { mkdir, stat } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { SHOWCASE_FILE, writeJson, type ShowcaseDocument } from '@thalweg/format';
import { writeFileAtomically } from '../output/write-file-atomically.js';
import type { Session } from '../session.js';
import type { ShowcasePoint } from './compute-showcase.js';

/** Writes the sheets of a showcase into the folder of their example, and returns them. A sheet that was cut short is refused. */
export async function recordShowcase(
  folder: string,
  points: readonly ShowcasePoint[],
  session: Session,
): Promise<ShowcaseDocument> {
  if (points.some(({ cut }) => cut)) {
    const message =
      'the time limit ended a search, and a sheet that is cut short cannot be reproduced: nothing was recorded; give more with --time-limit';
    throw new ThalwegError('time-limit', message);
  }
  const showcase: ShowcaseDocument = {
    schema: 'thalweg.showcase/1',
    points: points.map(({ parameters, sheet }) => ({ parameters, sheet })),
  };
  const path = join(folder, SHOWCASE_FILE);
  await mkdir(dirname(path), { recursive: true });
  await writeFileAtomically(path, writeJson(showcase));
  session.output.note(`wrote ${path}`);
  return showcase;
}

/** Throws `usage` where there is no folder to write into. */
export async function requireFolder(path: string): Promise<void> {
  const isFolder = await stat(path).then(
    (status) => status.isDirectory(),
    () => true,
  );
  if (isFolder) return;
  throw new ThalwegError('usage', `--record: expected the folder of an example, got ${path}; an archive never changes`);
}
