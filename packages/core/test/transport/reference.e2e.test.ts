import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';
import { expectClose } from '../linalg/support/expect-close.js';
import { leastAction } from './support/straight-action.js';

const program = fileURLToPath(new URL('../../../../tests/bench/transport_action.py', import.meta.url));

it.each([
  [2, 8],
  [2, 16],
  [3, 8],
])('the least action of %d levels and %d pieces is the one that SciPy finds', (levels, pieces) => {
  const env = { ...process.env, OPENBLAS_NUM_THREADS: '1' };
  const answer = execFileSync('/usr/bin/python3', [program, String(levels), String(pieces)], { env, encoding: 'utf8' });
  const { value } = JSON.parse(answer) as { readonly value: number };
  expect(value).toBeGreaterThan(0);
  expectClose(leastAction(levels, pieces), value, 1e-8 * value, 'root of the action');
});
