import { blockAlgebra, projectToAlgebra } from '../../src/algebra/block-algebra.js';
import { daviesGenerator } from '../../src/generator/davies-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { fromEntries, zeros } from '../../src/linalg/complex-matrix.js';
import type { Random } from '../../src/random.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { randomHermitianMatrix } from './random-states.js';

/** L(A) = Tr(A)/n − A. */
export function depolarising(n: number): Structure {
  return analyse(expectationGenerator({ algebra: blockAlgebra([n]), onto: { scalars: true } }));
}

/** L(A) = E_diag(A) − A. */
export function dephasing(n: number): Structure {
  return analyse(expectationGenerator({ algebra: blockAlgebra([n]), onto: { diagonal: true } }));
}

/** L(A) = Tr(σA) − A for diagonal σ: jumps √s_a |a><b|. */
export function generalisedDepolarising(weights: readonly number[], rate = 1): Structure {
  const n = weights.length;
  const jumps = weights.flatMap((s, a) =>
    weights.map((_, b) => {
      const matrix = zeros(n);
      matrix.re[a * n + b] = Math.sqrt(s);
      return { matrix, rate };
    }),
  );
  return analyse(lindbladGenerator({ algebra: blockAlgebra([n]), jumps }));
}

/** A reversible chain with weights π and conductances drawn from the random source. */
export function randomChain(n: number, random: Random): Structure {
  const weights = Array.from({ length: n }, () => 0.2 + random.uniform());
  const conductance = Array.from({ length: n }, () => Array.from({ length: n }, () => random.uniform()));
  return analyse(
    ratesGenerator(
      weights.map((w, x) =>
        weights.map((_, y) => (x === y ? 0 : (conductance[Math.min(x, y)][Math.max(x, y)] + 0.1) / w)),
      ),
    ),
  );
}

/** A thermal generator on the given blocks, one coupling inside the blocks and one for each pair of blocks. */
export function randomDavies(blocks: readonly number[], random: Random): Structure {
  const algebra = blockAlgebra(blocks);
  const couplings = [projectToAlgebra(algebra, randomHermitianMatrix(algebra.size, random))];
  for (let b = 0; b < blocks.length; b++) {
    for (let c = b + 1; c < blocks.length; c++) {
      const joined = (i: number, j: number): boolean =>
        (algebra.blockOf[i] === b && algebra.blockOf[j] === c) ||
        (algebra.blockOf[i] === c && algebra.blockOf[j] === b);
      const dense = randomHermitianMatrix(algebra.size, random);
      const n = algebra.size;
      couplings.push(fromEntries(n, n, (i, j) => (joined(i, j) ? [dense.re[i * n + j], dense.im[i * n + j]] : [0, 0])));
    }
  }
  const generator: Generator = daviesGenerator({
    algebra,
    hamiltonian: projectToAlgebra(algebra, randomHermitianMatrix(algebra.size, random)),
    couplings,
    beta: 0.8,
    spectrum: { kind: 'flat' },
  });
  return analyse(generator);
}
