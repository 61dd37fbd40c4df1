/**
 * The search for K on the three-level depolarising semigroup and the gaps of chains of qubits beside the same written with NumPy
 * and SciPy, one thread each; prints a Markdown table.
 *
 *     npm run bench -- against-scipy
 *
 * Both sides run in processes of their own, turn by turn, and the quickest counts. Ours is given as the first call of a process,
 * the compiler at work, and as the quickest of the calls that follow; `speed` compares the latter.
 */
import {
  analyse,
  depolarising,
  gapMatrixFree,
  metricOf,
  pauliJumps,
  runGradientEstimateStart,
  seededRandom,
} from '@thalweg/core';
import { type Outcome, inOwnProcess, least, runRival, timed } from './support/measure.js';
import { printTable, seconds } from './support/print-table.js';

const TURNS = 5;
const STARTS = 8;

/** Keeps the memory that NumPy frees for every batch, instead of handing it back and touching it afresh. */
const KEEP_MEMORY = { MALLOC_MMAP_THRESHOLD_: '1000000000', MALLOC_TRIM_THRESHOLD_: '1000000000' };

/** inf κ(ρ) from random starts of the rival's spreads, over all Hermitian H, ρ = exp(H), or over its eigenvalues alone. */
function curvatureSearch(covariant: boolean): number {
  const problem = { model: metricOf(analyse(depolarising(3))), mean: 'logarithmic', covariant } as const;
  const random = seededRandom('bench');
  let lowest = Infinity;
  for (let k = 0; k < STARTS; k++) {
    const spread = 0.5 + (2 * k) / (STARTS - 1);
    const x = Array.from({ length: covariant ? 3 : 9 }, () => spread * random.normal());
    lowest = Math.min(lowest, runGradientEstimateStart(problem, { kind: 'point', x }).value);
  }
  return lowest;
}

/** Gap of a chain with jumps X_i, rate 1, and Z_i, rate 0.7, in Σ rate (PAP − A); building the generator is counted. */
function chainGap(qubits: number): number {
  const at = (i: number, letter: string): string => 'I'.repeat(i) + letter + 'I'.repeat(qubits - 1 - i);
  const jumps = Array.from({ length: qubits }, (_, i) => [
    { string: at(i, 'X'), rate: 2 },
    { string: at(i, 'Z'), rate: 1.4 },
  ]);
  return gapMatrixFree(pauliJumps(jumps.flat()), null, seededRandom('bench')).value;
}

interface Comparison {
  readonly what: string;
  readonly run: () => number;
  /** Calls after the first. */
  readonly repeats: number;
  readonly turns: number;
  readonly rival: () => Outcome;
  /** Largest difference of the two values. */
  readonly agreement: number;
  readonly target: string;
}

const search = (what: string, covariant: boolean, env: Record<string, string>, target: string): Comparison => ({
  what: `K, three levels, ${STARTS} random starts${what}`,
  run: () => curvatureSearch(covariant),
  repeats: 40,
  turns: TURNS,
  rival: () => runRival('gradient_estimate_search.py', [3, STARTS], env),
  agreement: 1e-7,
  target,
});

const gap = (qubits: number, repeats: number, turns: number, target: string): Comparison => ({
  what: `gap, ${qubits} qubits, ${2 * qubits} local Pauli jumps`,
  run: () => chainGap(qubits),
  repeats,
  turns,
  rival: () => runRival('spin_chain_gap.py', [qubits]),
  agreement: 1e-8,
  target,
});

const COMPARISONS: readonly Comparison[] = [
  search('', false, {}, '20 ×'),
  search('; NumPy keeps its memory', false, KEEP_MEMORY, ''),
  search('; here eigenvalues alone', true, {}, ''),
  gap(8, 5, TURNS, '0.33 ×, 1024 MiB'),
  gap(10, 0, 1, 'finishes'),
];

interface Both {
  readonly first: Outcome;
  readonly later: Outcome;
}

function firstAndLater({ run, repeats }: Comparison): Both {
  const first = timed(run);
  const later = Array.from({ length: repeats }, () => timed(run));
  return { first, later: later.length > 0 ? least(later) : first };
}

function compare({ what, turns, rival, agreement, target }: Comparison, index: number): string[] {
  const pairs = Array.from({ length: turns }, () => ({ ours: inOwnProcess<Both>(String(index)), theirs: rival() }));
  const theirs = least(pairs.map((pair) => pair.theirs));
  const first = least(pairs.map((pair) => pair.ours.first));
  const later = least(pairs.map((pair) => pair.ours.later));
  const difference = Math.abs(later.value - theirs.value);
  if (!(difference <= agreement)) {
    throw new Error(`${what}: expected values within ${agreement}, got ${later.value} and ${theirs.value}`);
  }
  const speed = `${(theirs.seconds / later.seconds).toPrecision(2)} ×`;
  const memory = `${Math.ceil(Math.max(...pairs.map((pair) => pair.ours.later.mebibytes ?? NaN)))} MiB`;
  const times = [later, first, theirs].map((outcome) => seconds(outcome.seconds));
  return [what, ...times, speed, target, difference.toExponential(0), memory];
}

const chosen = process.argv[2];
if (chosen === undefined) {
  const head = ['what', 'Thalweg', 'first call', 'NumPy/SciPy', 'speed', 'target', 'values differ by', 'memory'];
  printTable(head, COMPARISONS.map(compare));
} else {
  process.stdout.write(JSON.stringify(firstAndLater(COMPARISONS[Number(chosen)] as Comparison)));
}
