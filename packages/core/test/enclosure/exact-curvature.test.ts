import { describe, expect, test } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { type ExactGenerator, exactCurvature, isBoundExact } from '../../src/enclosure/exact-curvature.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { hermitianPart, scale } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { SX, SZ, randomMatrix } from '../checker/arithmetic/witness-models.js';

/** Γ or Γ₂ of the exact tensor as doubles, cut to a block: entry ((p,k),(q,l)). */
function entryOf(exact: NonNullable<ReturnType<typeof exactCurvature>>, form: 'gamma' | 'gamma2', at: number[]) {
  const { units, scale: unit } = exact;
  const [p, q, k, l] = at;
  const x = exact[form][(p * units.count + q) * units.count + units.index[k * units.size + l]];
  const size = form === 'gamma' ? unit : unit * unit;
  const part = (y: bigint) => Number((y * 2n ** 80n) / size) / 2 ** 80;
  return { re: part(x?.re ?? 0n), im: part(x?.im ?? 0n) };
}

describe('Γ and Γ₂ without rounding', () => {
  test.each([[2], [3], [2, 1]])('agree with those in doubles, Hamiltonian included: blocks %s', (...blocks) => {
    const algebra = blockAlgebra(blocks);
    const random = seededRandom(`exact forms ${blocks}`);
    const n = algebra.size;
    // Block-diagonal jumps, so that the algebra is preserved.
    const inside = (x: ReturnType<typeof randomMatrix>) => {
      for (let i = 0; i < n * n; i++) {
        if (algebra.blockOf[Math.floor(i / n)] !== algebra.blockOf[i % n]) x.re[i] = x.im[i] = 0;
      }
      return x;
    };
    const jumps = [inside(randomMatrix(random, n)), inside(randomMatrix(random, n))];
    const hamiltonian = inside(hermitianPart(randomMatrix(random, n)));
    const plain = carreDuChamp(lindbladGenerator({ algebra, hamiltonian, jumps: jumps.map((matrix) => ({ matrix })) }));
    const exact = exactCurvature(algebra, { jumps, hamiltonian, weight: 1 });
    if (!exact) throw new Error('expected exact forms');
    for (const { block, gamma, gamma2 } of plain.blocks) {
      const size = blocks[block];
      const start = algebra.offsets[block];
      for (const [form, doubles] of [
        ['gamma', gamma],
        ['gamma2', gamma2],
      ] as const) {
        // prettier-ignore
        for (let i = 0; i < doubles.rows; i++) {
          for (let j = 0; j < doubles.rows; j++) {
            const at = [Math.floor(i / size), Math.floor(j / size), start + (i % size), start + (j % size)];
            const { re, im } = entryOf(exact, form, at);
            expect(Math.hypot(doubles.re[i * doubles.rows + j] - re, doubles.im[i * doubles.rows + j] - im)).toBeLessThan(1e-11); // prettier-ignore
          }
        }
      }
    }
  });

  test('a bound holds up to the constant and not one double above it', () => {
    // L(A) = XAX + ZAZ − 2A has cbe = 2, and X and Z are exact.
    const pair: ExactGenerator = { jumps: [SX, SZ], hamiltonian: null, weight: 1 };
    const exact = exactCurvature(blockAlgebra([2]), pair);
    if (!exact) throw new Error('expected exact forms');
    expect(isBoundExact(exact, 2)).toBe(true);
    expect(isBoundExact(exact, 2 + 2 ** -51)).toBe(false);
    expect(isBoundExact(exact, -1)).toBe(true);
    const doubled = exactCurvature(blockAlgebra([2]), { ...pair, weight: 2 });
    expect(doubled && isBoundExact(doubled, 4)).toBe(true);
    expect(doubled && isBoundExact(doubled, 4 + 2 ** -50)).toBe(false);
  });

  test('jumps too far apart in size, and forms too large, are left', () => {
    expect(
      exactCurvature(blockAlgebra([2]), { jumps: [SX, scale(SZ, 1e-100)], hamiltonian: null, weight: 1 }),
    ).toBeNull();
    const random = seededRandom('large');
    const large = exactCurvature(blockAlgebra([3]), { jumps: [randomMatrix(random, 3)], hamiltonian: null, weight: 1 });
    expect(large && isBoundExact(large, -1e6)).toBeNull();
  });
});
