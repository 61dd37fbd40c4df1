import { describe, expect, it } from 'vitest';
import {
  addScaledInto,
  frobeniusNorm,
  innerProduct,
  scale,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { type Programme, type ProgrammeBlock } from '../../src/programme/programme.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { randomHermitian, randomPositive } from './support/random-programme.js';

type Kind = ProgrammeBlock['kind'];

function programmeOf(objective: Float64Array, constant: ComplexMatrix, a: ComplexMatrix[], kind: Kind): Programme {
  const coefficients = a.map((matrix, unknown) => ({ unknown, matrix: sparseFromDense(matrix) }));
  return { objective, blocks: [{ kind, size: constant.rows, constant: sparseFromDense(constant), coefficients }] };
}

function size(random: Random, kind: Kind): { n: number; m: number } {
  const n = 3 + random.integer(7);
  return { n, m: 1 + random.integer(kind === 'diagonal' ? n - 1 : (n * (n - 1)) / 2) };
}

/** No feasible y: every A_i is orthogonal to a positive matrix of the given rank whose product with C is negative. */
function withoutY(random: Random, kind: Kind, full: boolean): Programme {
  const { n, m } = size(random, kind);
  const witness = randomPositive(n, kind, full ? n : 1, random);
  const square = innerProduct(witness, witness).re;
  const against = (a: ComplexMatrix, value: number): ComplexMatrix =>
    addScaledInto(a, witness, (value - innerProduct(witness, a).re) / square);
  const a = Array.from({ length: m }, () => against(randomHermitian(n, kind, 1, random), 0));
  const constant = against(randomHermitian(n, kind, 1, random), -0.1 - random.uniform());
  // b = A(X₀): the primal side is feasible.
  const x = randomPositive(n, kind, n, random);
  return programmeOf(
    Float64Array.from(a, (matrix) => innerProduct(matrix, x).re),
    constant,
    a,
    kind,
  );
}

/** No feasible X: −Σ y_i A_i is positive, of the given rank, along a y with b·y = 1, while C itself is positive. */
function withoutX(random: Random, kind: Kind, full: boolean): Programme {
  const { n, m } = size(random, kind);
  const y = Float64Array.from({ length: m }, () => random.normal());
  const a = Array.from({ length: m }, () => randomHermitian(n, kind, 1, random));
  const sum = zeros(n);
  for (let i = 1; i < m; i++) addScaledInto(sum, a[i], y[i]);
  a[0] = scale(addScaledInto(sum, randomPositive(n, kind, full ? n : 1, random), 1), -1 / y[0]);
  const objective = Float64Array.from({ length: m }, () => random.normal());
  objective[0] = (1 - objective.reduce((total, b, i) => total + (i > 0 ? b * y[i] : 0), 0)) / y[0];
  return programmeOf(objective, randomPositive(n, kind, n, random), a, kind);
}

/** Checks the certificate against the programme, sharing nothing with the solver. */
function expectCertificate(programme: Programme, { status, certificate }: ProgrammeSolution, tolerance: number): void {
  expect(certificate).not.toBeNull();
  if (!certificate) return;
  expect(status).toBe(`${certificate.kind}-infeasible`);
  const norms = programme.blocks.map(({ constant }) => frobeniusNorm(denseFromSparse(constant)));
  if (certificate.kind === 'primal') {
    const gain = certificate.y.reduce((sum, y, i) => sum + y * programme.objective[i], 0);
    expectClose(gain, 1, 1e-9, 'b·y');
    for (const { size: n, coefficients } of programme.blocks) {
      const direction = zeros(n);
      let weight = Number.MIN_VALUE;
      for (const { unknown, matrix } of coefficients) {
        const a = denseFromSparse(matrix);
        addScaledInto(direction, a, -certificate.y[unknown]);
        weight += Math.abs(certificate.y[unknown]) * frobeniusNorm(a);
      }
      expectBelow(Math.max(0, -hermitianEigenvalues(direction)[0]) / weight, tolerance, 'negative part of −Σ y_i A_i');
    }
    return;
  }
  let value = 0;
  const total = Math.hypot(...certificate.x.map((x) => frobeniusNorm(x)));
  programme.blocks.forEach(({ constant, coefficients }, k) => {
    const x = certificate.x[k];
    value += innerProduct(denseFromSparse(constant), x).re;
    expectBelow(Math.max(0, -hermitianEigenvalues(x)[0]) / total, 1e-13, 'negative part of X');
    if (programme.blocks.length > 1) return;
    for (const { matrix } of coefficients) {
      const a = denseFromSparse(matrix);
      expectBelow(Math.abs(innerProduct(a, x).re) / (frobeniusNorm(a) * total), tolerance, '<A_i, X>');
    }
  });
  expectClose(value, -1, 1e-9 * (1 + total * Math.max(...norms)), '<C, X>');
}

describe.each(['symmetric', 'hermitian', 'diagonal'] as const)('infeasible %s programmes', (kind) => {
  it.each([
    ['no y, certificate inside the cone', withoutY, true, 1e-12, 'dual-infeasible'],
    ['no y, certificate on the boundary', withoutY, false, 3e-8, 'dual-infeasible'],
    ['no X, certificate inside the cone', withoutX, true, 1e-12, 'primal-infeasible'],
    ['no X, certificate on the boundary', withoutX, false, 3e-8, 'primal-infeasible'],
  ] as const)('%s', (_, make, full, tolerance, status) => {
    for (let seed = 0; seed < 25; seed++) {
      const programme = make(seededRandom(`${kind} ${seed}`), kind, full);
      const solution = solveProgramme(programme);
      expect(solution.status, `seed ${seed}`).toBe(status);
      // Inside a cone of inequalities the proof may still touch the boundary in some of them.
      expectCertificate(programme, solution, kind === 'diagonal' ? 3e-8 : tolerance);
    }
  });
});

describe('simple infeasible programmes', () => {
  const identity = [
    [1, 0],
    [0, 1],
  ];
  const cases: Record<string, [Programme, ProgrammeSolution['status']]> = {
    'unbounded along the interior': [
      {
        objective: [1],
        blocks: [
          symmetricBlock(
            identity,
            identity.map((row) => row.map((x) => -x)),
          ),
        ],
      },
      'primal-infeasible',
    ],
    'unbounded along the boundary': [
      {
        objective: [1, 0],
        blocks: [
          symmetricBlock(
            identity,
            [
              [-1, 0],
              [0, 0],
            ],
            unit(2, 0, 1),
          ),
        ],
      },
      'primal-infeasible',
    ],
    'a diagonal entry that no y can lift': [
      {
        objective: [1],
        blocks: [
          symmetricBlock(
            [
              [-1, 0],
              [0, 1],
            ],
            unit(2, 1),
          ),
        ],
      },
      'dual-infeasible',
    ],
    'contradictory inequalities': [{ objective: [1], blocks: [diagonalBlock([1, -2], [1, -1])] }, 'dual-infeasible'],
    'no y even in the limit of large y, but nearly': [
      { objective: [1], blocks: [symmetricBlock(unit(2, 0, 1), unit(2, 0))] },
      'dual-infeasible',
    ],
  };
  it.each(Object.keys(cases))('%s', (name) => {
    const [programme, status] = cases[name];
    const solution = solveProgramme(programme);
    expect(solution.status).toBe(status);
    expectCertificate(programme, solution, 2e-8);
  });

  it('a feasible programme with a far optimum is not mistaken for one', () => {
    const programme = { objective: [1], blocks: [diagonalBlock([1e6, 1], [1, -1])] };
    const solution = solveProgramme(programme);
    expect(solution).toMatchObject({ status: 'optimal', certificate: null });
    expectClose(solution.dualObjective / 1e6, 1, 1e-8, 'optimum');
  });
});
