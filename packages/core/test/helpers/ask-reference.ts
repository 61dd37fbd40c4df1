import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import type { ComplexMatrix } from '../../src/linalg/complex-matrix.js';

const PYTHON = '/usr/bin/python3';
const PROGRAM = fileURLToPath(new URL('../../../../tests/reference/answer.py', import.meta.url));

/** A matrix as the reference reads and writes it; a list of numbers for a vector. */
export interface WrittenMatrix {
  readonly re: number[][];
  readonly im: number[][];
}

/** What the reference says to one request: see the head of answer.py. Numbers that are not finite are strings. */
export interface Answer {
  readonly value?: unknown;
  readonly error?: string;
  readonly [more: string]: unknown;
}

/**
 * Answers of the independent NumPy program to a list of requests, asked in one process when the first test wants them, for
 * starting Python takes longer than most answers. Where Python, NumPy or SciPy is missing, or a request is refused, every
 * test that asks fails.
 */
export function referenceAnswers(requests: readonly object[]): () => readonly Answer[] {
  let outcome: { answers: Answer[] } | { error: unknown } | null = null;
  return () => {
    outcome ??= attempt(requests);
    if ('error' in outcome) throw outcome.error;
    return outcome.answers;
  };
}

function attempt(requests: readonly object[]): { answers: Answer[] } | { error: unknown } {
  try {
    return { answers: ask(requests) };
  } catch (error) {
    return { error };
  }
}

function ask(requests: readonly object[]): Answer[] {
  const run = spawnSync(PYTHON, [PROGRAM], {
    input: JSON.stringify(requests),
    encoding: 'utf8',
    maxBuffer: 2 ** 28,
    // The matrices are small: more threads of OpenBLAS only wait for each other.
    env: { ...process.env, OPENBLAS_NUM_THREADS: '1' },
  });
  if (run.error || /ModuleNotFoundError/.test(run.stderr)) {
    const reason = run.error?.message ?? run.stderr.trim().split('\n').at(-1);
    throw new Error(
      `${PYTHON} with NumPy and SciPy is needed: apt-get install python3-numpy python3-scipy (${reason})`,
    );
  }
  if (run.status !== 0) throw new Error(`answer.py ended with status ${run.status}:\n${run.stderr}`);
  const answers = JSON.parse(run.stdout) as Answer[];
  answers.forEach(({ error }, k) => {
    if (error !== undefined) throw new Error(`the reference refused ${JSON.stringify(requests[k])}: ${error}`);
  });
  return answers;
}

/** The number of an answer, "-Infinity" and its like included. */
export function numberOf(value: unknown): number {
  return Number(value);
}

export function writeMatrix(a: ComplexMatrix): WrittenMatrix {
  const rows = (part: Float64Array): number[][] =>
    Array.from({ length: a.rows }, (_, i) => [...part.subarray(i * a.cols, (i + 1) * a.cols)]);
  return { re: rows(a.re), im: rows(a.im) };
}
