import { open, readFile, truncate, type FileHandle } from 'node:fs/promises';
import { ThalwegError } from '@thalweg/core';
import {
  canonicalJson,
  parsePoint,
  parseSweep,
  type JsonValue,
  type PointDocument,
  type SweepDocument,
} from '@thalweg/format';
import { pointKey } from '../example/recorded-sheet.js';
import { inDocument } from '../input/in-document.js';
import { writeFileAtomically } from '../output/write-file-atomically.js';

/** The file in which a sweep keeps its finished points: a line with the sweep, then one line a point, in the order they came. */
export interface Journal {
  /** Points finished before, by `pointKey`. */
  readonly finished: ReadonlyMap<string, PointDocument>;
  /** Adds a finished point; resolves when it is on the disk. */
  append(point: PointDocument): Promise<void>;
  close(): Promise<void>;
}

/**
 * Opens the file of a sweep, or makes it. A last line without an end, which a kill in the middle of writing leaves, is cut off; a
 * line that is broken otherwise, and a file that belongs to something else, are refused. Throws `bad-file`, `usage`, `cannot-write`.
 */
export async function openJournal(path: string, sweep: SweepDocument): Promise<Journal> {
  const text = await readText(path);
  const end = text.lastIndexOf('\n') + 1;
  const lines = text.slice(0, end).split('\n').slice(0, -1);
  if (lines.length === 0 && text !== '' && !lineOf(sweep).startsWith(text)) throw notOurs(path);
  const finished = lines.length === 0 ? new Map<string, PointDocument>() : readLines(path, lines, sweep);
  if (end < Buffer.byteLength(text)) await truncate(path, Buffer.byteLength(text.slice(0, end)));
  const file = await openToAppend(path);
  let last = Promise.resolve();
  if (lines.length === 0) last = appendLine(file, lineOf(sweep));
  await last;
  return {
    finished,
    append: (point) => (last = last.then(() => appendLine(file, lineOf(point)))),
    close: async () => {
      await last;
      await file.close();
    },
  };
}

/** Writes the file of a finished sweep afresh, its points in the given order: the same bytes whichever came first. */
export async function rewriteJournal(
  path: string,
  sweep: SweepDocument,
  points: readonly PointDocument[],
): Promise<void> {
  await writeFileAtomically(path, [sweep, ...points].map(lineOf).join(''));
}

/** One line: the canonical JSON of a document. */
export function lineOf(document: SweepDocument | PointDocument): string {
  const plain: unknown = JSON.parse(JSON.stringify(document));
  return `${canonicalJson(plain as JsonValue)}\n`;
}

async function readText(path: string): Promise<string> {
  try {
    return await readFile(path, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return '';
    throw error;
  }
}

function readLines(path: string, lines: readonly string[], sweep: SweepDocument): Map<string, PointDocument> {
  const [head = '', ...rest] = lines;
  requireSameSweep(path, head, sweep);
  const points = rest.map((line, k) => inDocument(`line ${k + 2} of ${path}`, () => parsePoint(line)));
  return new Map(points.map((point) => [pointKey(point.parameters), point]));
}

function requireSameSweep(path: string, head: string, sweep: SweepDocument): void {
  let found: SweepDocument;
  try {
    found = parseSweep(head);
  } catch {
    throw notOurs(path);
  }
  const different = (Object.keys(sweep) as (keyof SweepDocument)[]).find(
    (field) => canonicalJson(found[field] as JsonValue) !== canonicalJson(sweep[field] as JsonValue),
  );
  if (different === undefined) return;
  const got = `${JSON.stringify(found[different])} as its ${different}`;
  const message = `expected ${path} to hold points of this sweep, with ${JSON.stringify(sweep[different])}, got ${got}; give another file with -o`;
  throw new ThalwegError('usage', message);
}

function notOurs(path: string): ThalwegError {
  return new ThalwegError(
    'bad-file',
    `expected the points of a sweep in ${path}, got another file; give another one with -o`,
  );
}

async function openToAppend(path: string): Promise<FileHandle> {
  try {
    return await open(path, 'a');
  } catch (cause) {
    throw new ThalwegError(
      'cannot-write',
      `cannot write ${path}: ${(cause as Error).message}. Give a file that you may write to`,
      {
        cause,
      },
    );
  }
}

/** One write of a whole line: a kill leaves it whole, or cut off at the end of the file. */
async function appendLine(file: FileHandle, line: string): Promise<void> {
  const bytes = Buffer.from(line);
  const { bytesWritten } = await file.write(bytes);
  if (bytesWritten < bytes.length)
    throw new ThalwegError('cannot-write', 'cannot write the file of the sweep: the disk is full');
  await file.datasync();
}
