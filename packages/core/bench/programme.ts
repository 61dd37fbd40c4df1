/**
 * Times the semidefinite solver against CVXOPT (Debian's python3-cvxopt) on the same programmes, one thread each, to the
 * same tolerance; processor time, which a busy machine disturbs least. From the repository root, all or the programmes
 * whose names hold a word:
 *
 *     npm run bench programme
 *     npx esbuild packages/core/bench/programme.ts --bundle --platform=node --format=esm --outfile=node_modules/.cache/b.mjs
 *     node node_modules/.cache/b.mjs qutrit
 */
import { sparseFromTriplets, type Triplet } from '../src/linalg/sparse-matrix.js';
import { type Coefficient, type Programme } from '../src/programme/programme.js';
import { solveProgramme } from '../src/programme/solve-programme.js';
import { seededRandom } from '../src/random.js';
import { depolarisingJumps } from '../test/programme/support/gell-mann.js';
import { liftInstance, smallAnsatz, wideAnsatz } from '../test/programme/support/lift-instance.js';
import { randomProgramme } from '../test/programme/support/random-programme.js';
import { rivalSolutions } from '../test/programme/support/reference-solver.js';

/** Aimed at by both sides. */
const TOLERANCE = 1e-8;

/**
 * Like a lift's form: [P C; C* 1] ⪰ 0 with the corner P of `heads` sub-blocks and the square of `tails` more, all of side
 * `side`; every unknown adds one sub-block of C, or two of P, of normal entries; maximise t in P − t.
 */
function lmi(heads: number, tails: number, side: number, unknowns: number, seed: string): Programme {
  const random = seededRandom(seed);
  const size = (heads + tails) * side;
  const coefficients = Array.from({ length: unknowns - 1 }, (_, unknown): Coefficient => {
    const entries: Triplet[] = [];
    const row = random.integer(heads) * side;
    const inside = random.uniform() < 0.1;
    const col = (inside ? random.integer(heads) : heads + random.integer(tails)) * side;
    for (let i = 0; i < side; i++) {
      for (let j = 0; j < (row === col ? i : side); j++) {
        const re = random.normal();
        const im = random.normal();
        entries.push([row + i, col + j, re, im], [col + j, row + i, re, -im]);
      }
    }
    return { unknown, matrix: sparseFromTriplets(size, size, entries) };
  });
  const identity = (count: number): Triplet[] => Array.from({ length: count }, (_, i): Triplet => [i, i, 1, 0]);
  coefficients.push({ unknown: unknowns - 1, matrix: sparseFromTriplets(size, size, identity(heads * side)) });
  const shift = Array.from({ length: size * 4 }, (): Triplet[] => {
    const i = random.integer(size);
    const j = random.integer(size);
    const re = random.normal();
    return [
      [i, j, re, 0],
      [j, i, re, 0],
    ];
  });
  const constant = sparseFromTriplets(size, size, [
    ...identity(size).map(([i, j]): Triplet => [i, j, 30, 0]),
    ...shift.flat(),
  ]);
  const objective = new Float64Array(unknowns);
  objective[unknowns - 1] = 1;
  return { objective, blocks: [{ kind: 'hermitian', size, constant, coefficients }] };
}

const PROGRAMMES: Record<string, () => Programme> = {
  'lift, qubit, 2 × 24, 19 unknowns': () => liftInstance(depolarisingJumps(2), wideAnsatz(3))!,
  'lift, qutrit, 2 × 216, 25 unknowns': () => liftInstance(depolarisingJumps(3), smallAnsatz(8))!,
  'lift, qutrit, 2 × 216, 209 unknowns': () => liftInstance(depolarisingJumps(3), wideAnsatz(8))!,
  'LMI, complex 60, 200 unknowns': () => lmi(5, 15, 3, 200, 'a'),
  'LMI, complex 120, 500 unknowns': () => lmi(8, 32, 3, 500, 'b'),
  'random sparse, real 60, 300 unknowns': () =>
    randomProgramme({ sizes: [60], kind: 'symmetric', unknowns: 300, density: 0.01 }, seededRandom('d')),
  'random sparse, complex 60, 300 unknowns': () =>
    randomProgramme({ sizes: [60], kind: 'hermitian', unknowns: 300, density: 0.01 }, seededRandom('e')),
  'random dense, real 60, 300 unknowns': () =>
    randomProgramme({ sizes: [60], kind: 'symmetric', unknowns: 300, density: 1 }, seededRandom('f')),
  'random dense, complex 30, 100 unknowns': () =>
    randomProgramme({ sizes: [30], kind: 'hermitian', unknowns: 100, density: 1 }, seededRandom('g')),
};

/** CVXOPT took 445 s, where this solver took 7 s; run only when named. */
const SLOW: Record<string, () => Programme> = {
  'slow: LMI, complex 200, 1500 unknowns': () => lmi(10, 90, 2, 1500, 'c'),
};

const words = process.argv.slice(2);
const chosen = Object.entries(words.length > 0 ? { ...PROGRAMMES, ...SLOW } : PROGRAMMES).filter(
  ([name]) => words.length === 0 || words.some((word) => name.includes(word)),
);
solveProgramme(PROGRAMMES['lift, qubit, 2 × 24, 19 unknowns'](), { tolerance: TOLERANCE });
for (const [name, make] of chosen) {
  const programme = make();
  const begin = process.cpuUsage();
  const solution = solveProgramme(programme, { tolerance: TOLERANCE });
  const { user, system } = process.cpuUsage(begin);
  const seconds = (user + system) / 1e6;
  const [rival] = rivalSolutions([programme], TOLERANCE);
  const difference = rival.dual === null ? NaN : solution.dualObjective - rival.dual;
  console.log(
    `${name.padEnd(40)} ${seconds.toFixed(3).padStart(8)} s in ${solution.iterations} (${solution.status}), ` +
      `CVXOPT ${rival.seconds.toFixed(3).padStart(9)} s in ${rival.iterations} (${rival.status}), ` +
      `ratio ${(rival.seconds / seconds).toFixed(2).padStart(6)}, optimum ${solution.dualObjective.toPrecision(9)}, ` +
      `difference ${difference.toExponential(1)}`,
  );
}
