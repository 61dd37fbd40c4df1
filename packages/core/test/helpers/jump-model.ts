import type { BlockAlgebra } from '../../src/algebra/block-algebra.js';
import { withDeclaredState } from '../../src/generator/declared-state.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  directSum,
  hermitianPart,
  multiply,
  multiplyAdjointFirst,
  scale,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import type { Random } from '../../src/random.js';
import { randomUnitary, shuffle } from '../linalg/support/inputs.js';
import type { BalancedModel } from './random-balanced-generator.js';

/** A generator as its jumps, so that it can be written in other ways; jumps of one `group` may be mixed by a unitary. */
export interface JumpModel {
  readonly algebra: BlockAlgebra;
  readonly sigma: ComplexMatrix;
  readonly jumps: readonly { readonly matrix: ComplexMatrix; readonly group: string }[];
}

/** The jumps R = √2 e^{−ω/4}V of a balanced model, grouped by frequency and by the corner they live in. */
export function jumpModel({ generator, sigma, terms }: BalancedModel): JumpModel {
  const { algebra } = generator;
  const jumps = terms.map(({ matrix, frequency }) => {
    const at = matrix.re.findIndex((x, k) => x !== 0 || matrix.im[k] !== 0);
    const corner = [Math.floor(at / algebra.size), at % algebra.size].map((i) => algebra.blockOf[i]);
    return {
      matrix: scale(matrix, Math.SQRT2 * Math.exp(-frequency / 4)),
      group: `${frequency.toFixed(9)} ${corner.join()}`,
    };
  });
  return { algebra, sigma, jumps };
}

export function generatorOf({ algebra, sigma, jumps }: JumpModel): Generator {
  return withDeclaredState(lindbladGenerator({ algebra, jumps }), sigma);
}

/** The model seen in another basis of every block. */
export function rotated(model: JumpModel, random: Random): JumpModel {
  const u = directSum(model.algebra.blocks.map((n) => randomUnitary(random, n)));
  const turn = (a: ComplexMatrix): ComplexMatrix => multiplyAdjointFirst(u, multiply(a, u));
  return {
    ...model,
    sigma: hermitianPart(turn(model.sigma)),
    jumps: model.jumps.map(({ matrix, group }) => ({ matrix: turn(matrix), group })),
  };
}

export function reordered(model: JumpModel, random: Random): JumpModel {
  return { ...model, jumps: shuffle(random, model.jumps) };
}

/** Every group of jumps, with one jump of zero added, mixed by a random unitary: one jump more in each group. */
export function mixed(model: JumpModel, random: Random): JumpModel {
  const groups = [...new Set(model.jumps.map(({ group }) => group))];
  const jumps = groups.flatMap((group) => {
    const members = model.jumps.filter((jump) => jump.group === group);
    const u = randomUnitary(random, members.length + 1);
    return Array.from({ length: members.length + 1 }, (_, k) => {
      const matrix = zeros(model.algebra.size);
      members.forEach((member, j) => {
        const at = k * u.cols + j;
        addScaledInto(matrix, member.matrix, u.re[at], u.im[at]);
      });
      return { matrix, group };
    });
  });
  return { ...model, jumps };
}

/** Time in units of 1/c: every rate times c. */
export function rescaled(model: JumpModel, c: number): JumpModel {
  return {
    ...model,
    jumps: model.jumps.map(({ matrix, group }) => ({ matrix: scale(matrix, Math.sqrt(c)), group })),
  };
}
