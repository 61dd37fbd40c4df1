import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import type { ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { writeMatrix } from '../helpers/ask-reference.js';

const PYTHON = '/usr/bin/python3';
const PROGRAM = fileURLToPath(new URL('../../../../tests/reference/exact_inertia.py', import.meta.url));

/** A form of L(A) = 2 Σ_j (V_j*AV_j − ½{V_j*V_j,A}), the doubles being exact, and the bounds at which it is wanted. */
export interface InertiaRequest {
  readonly form: 'gap' | 'curvature';
  readonly blocks: readonly number[];
  readonly jumps: readonly ComplexMatrix[];
  readonly bounds: readonly number[];
}

/** For every bound of every request, the numbers of negative and of zero directions, by Python's fractions. */
export function exactInertia(requests: readonly InertiaRequest[]): [number, number][][] {
  const input = JSON.stringify(requests.map((request) => ({ ...request, jumps: request.jumps.map(writeMatrix) })));
  const run = spawnSync(PYTHON, [PROGRAM], { input, encoding: 'utf8', maxBuffer: 2 ** 28 });
  if (run.error || run.status !== 0) throw new Error(`${PYTHON} is needed: ${run.error?.message ?? run.stderr}`);
  return JSON.parse(run.stdout) as [number, number][][];
}
