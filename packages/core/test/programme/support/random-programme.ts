import { fromEntries, hermitianPart, type ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { addScaledInto, innerProduct, multiplyAdjointSecond, zeros } from '../../../src/linalg/complex-matrix.js';
import { sparseFromDense } from '../../../src/linalg/sparse-matrix.js';
import { type Programme, type ProgrammeBlock } from '../../../src/programme/programme.js';
import { type Random } from '../../../src/random.js';

export interface RandomShape {
  readonly sizes: readonly number[];
  /** Of all blocks, or of each. */
  readonly kind: ProgrammeBlock['kind'] | readonly ProgrammeBlock['kind'][];
  readonly unknowns: number;
  /** Chance of an entry of a coefficient not to vanish. */
  readonly density: number;
  /** Ranks of the random X and S that make the programme feasible; full by default. */
  readonly primalRank?: number;
  readonly dualRank?: number;
}

/** Feasible on both sides: b = A(X₀) and C = S₀ + Aᵀ(y₀) for random positive X₀ and S₀. */
export function randomProgramme(shape: RandomShape, random: Random): Programme {
  const objective = new Float64Array(shape.unknowns);
  const y = Float64Array.from(objective, () => random.normal());
  const blocks = shape.sizes.map((size, k): ProgrammeBlock => {
    const kind = typeof shape.kind === 'string' ? shape.kind : shape.kind[k];
    const coefficients = Array.from(objective, () => randomHermitian(size, kind, shape.density, random));
    const x = randomPositive(size, kind, shape.primalRank ?? size, random);
    const constant = randomPositive(size, kind, shape.dualRank ?? size, random);
    coefficients.forEach((a, i) => {
      objective[i] += innerProduct(a, x).re;
      addScaledInto(constant, a, y[i]);
    });
    return {
      kind,
      size,
      constant: sparseFromDense(constant),
      coefficients: coefficients.map((a, unknown) => ({ unknown, matrix: sparseFromDense(a) })),
    };
  });
  return { objective, blocks };
}

/** Normal entries, each kept with the chance `density`. */
export function randomHermitian(
  size: number,
  kind: ProgrammeBlock['kind'],
  density: number,
  random: Random,
): ComplexMatrix {
  const a = zeros(size);
  for (let i = 0; i < size; i++) {
    for (let j = kind === 'diagonal' ? i : 0; j <= i; j++) {
      if (random.uniform() >= density) continue;
      a.re[i * size + j] = a.re[j * size + i] = random.normal();
      if (kind !== 'hermitian' || i === j) continue;
      a.im[i * size + j] = random.normal();
      a.im[j * size + i] = -a.im[i * size + j];
    }
  }
  return a;
}

/** G G* with normal entries in the size × rank matrix G; for diagonal blocks a diagonal with `rank` squares. */
export function randomPositive(
  size: number,
  kind: ProgrammeBlock['kind'],
  rank: number,
  random: Random,
): ComplexMatrix {
  const g = fromEntries(size, rank, (i, j) =>
    kind === 'diagonal' && i !== j ? [0, 0] : [random.normal(), kind === 'hermitian' ? random.normal() : 0],
  );
  return hermitianPart(multiplyAdjointSecond(g, g));
}
