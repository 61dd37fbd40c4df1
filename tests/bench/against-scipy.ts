/**
 * Two searches beside the same ones written with NumPy and SciPy, one thread each, in one run; prints a Markdown table.
 *
 *     npm run bench -- against-scipy
 */
import { spawnSync } from 'node:child_process';
import {
  analyse,
  depolarising,
  gapMatrixFree,
  lindbladGenerator,
  blockAlgebra,
  metricOf,
  pauliString,
  runGradientEstimateStart,
  seededRandom,
  type Generator,
} from '@thalweg/core';

const STARTS = 8;

interface Answer {
  readonly seconds: number;
  readonly value: number;
}

/** inf κ(ρ) of the three-level depolarising semigroup over all Hermitian H, ρ = exp(H): no structure used. */
function curvatureSearch(): Answer {
  const problem = { model: metricOf(analyse(depolarising(3))), mean: 'logarithmic' as const, covariant: false };
  const random = seededRandom(1);
  const run = (): number => {
    let best = Infinity;
    for (let k = 0; k < STARTS; k++) {
      const x = Array.from({ length: 9 }, () => random.normal());
      best = Math.min(best, runGradientEstimateStart(problem, { kind: 'point', x }).value);
    }
    return best;
  };
  run();
  const started = performance.now();
  const value = run();
  return { seconds: (performance.now() - started) / 1000, value };
}

/** Gap of n qubits with jumps X_i (rate 1) and Z_i (rate 0.7), matrix-free. */
function chainGap(qubits: number): Answer {
  const g = chain(qubits);
  const started = performance.now();
  const { value } = gapMatrixFree(g, null, seededRandom('gap'));
  return { seconds: (performance.now() - started) / 1000, value };
}

function chain(qubits: number): Generator {
  const jumps = [];
  for (let q = 0; q < qubits; q++) {
    for (const [letter, rate] of [
      ['X', 1],
      ['Z', 0.7],
    ] as const) {
      const string = 'I'.repeat(q) + letter + 'I'.repeat(qubits - q - 1);
      jumps.push({ label: string, rate, matrix: pauliString(string) });
    }
  }
  return lindbladGenerator({ algebra: blockAlgebra([2 ** qubits]), jumps });
}

function python(script: string, args: readonly number[]): Answer {
  const { stdout, status, stderr } = spawnSync('/usr/bin/python3', [`tests/bench/${script}`, ...args.map(String)], {
    encoding: 'utf8',
    env: { ...process.env, OPENBLAS_NUM_THREADS: '1' },
  });
  if (status !== 0) throw new Error(`expected NumPy and SciPy for /usr/bin/python3, got: ${stderr}`);
  return JSON.parse(stdout) as Answer;
}

function row(what: string, ours: Answer, theirs: Answer): string {
  const difference = Math.abs(ours.value - theirs.value).toExponential(1);
  const ratio = theirs.seconds / ours.seconds;
  return `| ${what} | ${ours.seconds.toFixed(3)} s | ${theirs.seconds.toFixed(3)} s | ${ratio.toFixed(2)} | ${difference} |`;
}

const lines = [
  '| search | Thalweg | NumPy/SciPy | times faster | difference of values |',
  '| --- | --- | --- | --- | --- |',
  row(
    `ge, three-level depolarising, ${STARTS} random starts`,
    curvatureSearch(),
    python('gradient_estimate_search.py', [3, STARTS]),
  ),
  row('gap, 7 qubits, 14 local Pauli jumps', chainGap(7), python('spin_chain_gap.py', [7])),
  row('gap, 8 qubits, 16 local Pauli jumps', chainGap(8), python('spin_chain_gap.py', [8])),
];
process.stdout.write(`${lines.join('\n')}\n`);
