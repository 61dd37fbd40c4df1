import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parseDocument } from '@thalweg/format';
import { startThalweg } from '../../../apps/cli/test/helpers/thalweg.js';
import { ensureBundle } from '../../../packages/setup/lib/build.mjs';
import { folderOf } from './bundled.js';

/** What sealing an example and reproducing its archive came to. */
export interface Reproduced {
  readonly exits: readonly (number | undefined)[];
  readonly name: string;
  /** Changes of brackets that are neither tighter nor of a stronger grade. */
  readonly worse: readonly string[];
  /** Claims that are refuted or open. */
  readonly doubtful: readonly string[];
  readonly models: 'as recorded' | 'not as recorded';
}

/** What it should come to. */
export const REPRODUCED: Omit<Reproduced, 'name'> = { exits: [0, 0], worse: [], doubtful: [], models: 'as recorded' };

/** Long, since a busy machine may take a hundred times what the work takes. */
export const REPRODUCE_TIMEOUT = 300_000;

/** Runs `seal`, then `reproduce` on the archive, as a reader would. */
export async function reproduceBundled(name: string): Promise<Reproduced> {
  await ensureBundle();
  const archives = mkdtempSync(join(tmpdir(), 'thalweg-examples-'));
  try {
    const sealed = await startThalweg(['seal', folderOf(name), '-o', archives, '--json']);
    if (sealed.exitCode !== 0) throw new Error(String(sealed.stderr));
    const seal = JSON.parse(String(sealed.stdout)) as { path: string; name: string };
    const reproduced = await startThalweg(['reproduce', seal.path, '--threads', '1', '--json']);
    const found = parseDocument(String(reproduced.stdout));
    if (found.schema !== 'thalweg.reproduction/1') throw new Error(String(reproduced.stderr));
    const { points } = found;
    const changes = points.flatMap(({ differences }) => differences);
    const claims = points.flatMap((point) => point.claims);
    return {
      exits: [sealed.exitCode, reproduced.exitCode],
      name: seal.name,
      worse: changes.filter(({ change }) => !BETTER.has(change)).map((difference) => JSON.stringify(difference)),
      doubtful: claims.filter(({ state }) => DOUBTFUL.has(state)).map((claim) => JSON.stringify(claim)),
      models: points.every(({ model, recordedModel }) => recordedModel === model) ? 'as recorded' : 'not as recorded',
    };
  } finally {
    rmSync(archives, { recursive: true, force: true });
  }
}

const BETTER: ReadonlySet<string> = new Set(['tighter', 'stronger-grade']);

const DOUBTFUL: ReadonlySet<string> = new Set(['refuted', 'open']);
