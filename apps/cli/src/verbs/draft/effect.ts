import { mkdir, readdir } from 'node:fs/promises';
import { basename, join, resolve } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { denseModel, parseModel, resolveModel, type ModelDocument } from '@thalweg/format';
import { completeAnswers } from '../../draft/complete-answers.js';
import { draftFiles } from '../../draft/draft-files.js';
import { computeShowcase } from '../../example/compute-showcase.js';
import { recordShowcase } from '../../example/record-showcase.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { filesBesideSource } from '../../input/files-beside.js';
import { inDocument } from '../../input/in-document.js';
import { readPackage } from '../../input/read-package.js';
import { readSource } from '../../input/read-source.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import type { Session } from '../../session.js';
import type { DraftPlan } from './plan.js';

/** Makes the folder of a new example, with the sheets of its showcase. */
export async function draftEffect(plan: DraftPlan, session: Session): Promise<ExitStatus> {
  const { folder, seed, convention, threads, timeLimit } = plan;
  await requireEmpty(folder);
  const model = plan.from === null ? null : await readWhole(plan.from, session);
  const name = basename(resolve(folder));
  const title = model?.title ?? null;
  const fallbacks = { ...NO_ANSWERS, name, title, summary: plan.title ?? title, licence: 'MIT' };
  const answers = await completeAnswers(plan, fallbacks, session.terminal);
  const files = draftFiles(answers, model);
  await makeFolder(folder);
  for (const [file, text] of files) await writeFileAtomically(join(folder, file), text);
  session.keep(`${folder} holds the draft; thalweg reproduce ${folder} --record completes it`);
  const example = await readPackage(folder, session);
  const settings = { rows: null, seed, convention, limits: { threads, timeLimit } };
  const points = await computeShowcase(example, () => settings, session);
  await recordShowcase(folder, points, session);
  const paths = [...files.keys(), 'evidence/showcase.json'].map((file) => join(folder, file));
  const { output } = session;
  if (output.json) output.document({ schema: 'thalweg.draft/1', name: answers.name, folder, files: paths });
  else output.result(`${paths.map((path) => `  ${path}`).join('\n')}\n`);
  output.note(`Next: thalweg reproduce ${folder}; thalweg seal ${folder}`);
  return EXIT_STATUS.yes;
}

const NO_ANSWERS = {
  name: null,
  title: null,
  summary: null,
  author: null,
  orcid: null,
  affiliation: null,
  licence: null,
};

/** A model with its matrices inside: those in files are written out. */
async function readWhole(path: string, session: Session): Promise<ModelDocument> {
  const source = await readSource(path, session.terminal.stdin);
  return inDocument(source.name, () => {
    const document = parseModel(source.bytes);
    const resolved = resolveModel(document, filesBesideSource(source));
    return JSON.stringify(document).includes('"file":') ? denseModel(resolved) : document;
  });
}

async function requireEmpty(folder: string): Promise<void> {
  const found = await readdir(folder).catch((error: NodeJS.ErrnoException) => (error.code === 'ENOENT' ? [] : null));
  if (found !== null && found.length === 0) return;
  const what = found === null ? 'no folder that can be read' : `a folder with ${found[0] ?? ''} in it`;
  throw new ThalwegError('cannot-write', `expected a new or empty folder, got ${folder}, ${what}; give another one`);
}

async function makeFolder(folder: string): Promise<void> {
  await mkdir(folder, { recursive: true }).catch((cause: unknown) => {
    throw new ThalwegError(
      'cannot-write',
      `cannot make the folder ${folder}: ${(cause as Error).message}. Give another one`,
      {
        cause,
      },
    );
  });
}
