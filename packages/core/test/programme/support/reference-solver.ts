import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type SparseMatrix } from '../../../src/linalg/sparse-matrix.js';
import { type Programme } from '../../../src/programme/programme.js';

/** Debian's interpreter, which sees its python3-cvxopt. */
const PYTHON = '/usr/bin/python3';

export interface ReferenceAnswer {
  /** CVXOPT's: 'optimal', 'primal infeasible' (no feasible y), 'dual infeasible' (unbounded), 'unknown'. */
  readonly status: string;
  readonly primal: number | null;
  readonly dual: number | null;
  readonly y: number[] | null;
  readonly iterations: number;
  /** Processor time of the solver. */
  readonly seconds: number;
}

/** Solves programmes with CVXOPT on one thread; throws with what to install when it is missing. */
export function referenceSolutions(programmes: readonly Programme[]): ReferenceAnswer[] {
  return runScript('reference/semidefinite.py', [], programmes);
}

/** The same with a fixed tolerance and timed. */
export function rivalSolutions(programmes: readonly Programme[], tolerance: number): ReferenceAnswer[] {
  return runScript('bench/semidefinite.py', [String(tolerance)], programmes);
}

function runScript(path: string, args: readonly string[], programmes: readonly Programme[]): ReferenceAnswer[] {
  if (!existsSync(PYTHON)) throw new Error(`expected ${PYTHON}; apt-get install python3 python3-cvxopt`);
  const script = findUpwards(`tests/${path}`);
  const run = spawnSync(PYTHON, [script, ...args], {
    input: JSON.stringify(programmes.map(plainProgramme)),
    encoding: 'utf8',
    env: { ...process.env, OPENBLAS_NUM_THREADS: '1' },
    maxBuffer: 2 ** 30,
  });
  if (run.error) throw run.error;
  if (run.status !== 0) throw new Error(`expected ${path} to succeed, got status ${run.status}: ${run.stderr}`);
  return JSON.parse(run.stdout) as ReferenceAnswer[];
}

function plainProgramme({ objective, blocks }: Programme): unknown {
  return {
    objective: Array.from(objective),
    blocks: blocks.map(({ kind, size, constant, coefficients }) => ({
      kind,
      size,
      constant: triplets(constant),
      coefficients: coefficients.map(({ unknown, matrix }) => [unknown, triplets(matrix)]),
    })),
  };
}

function triplets(a: SparseMatrix): number[][] {
  const list: number[][] = [];
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) list.push([i, a.colIndex[e], a.re[e], a.im[e]]);
  }
  return list;
}

/** The file of this path in the nearest folder above this one that has it: tests run from the sources, timings bundled. */
function findUpwards(path: string): string {
  for (let folder = dirname(fileURLToPath(import.meta.url)); ; folder = dirname(folder)) {
    if (existsSync(join(folder, path))) return join(folder, path);
    if (dirname(folder) === folder) throw new Error(`expected ${path} in a folder above ${import.meta.url}`);
  }
}
