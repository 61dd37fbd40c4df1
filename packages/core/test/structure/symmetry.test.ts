import { describe, expect, it } from 'vitest';
import { basisElement, blockAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { localDepolarising, pauliString, thermalQubit, truncatedOscillator } from '../../src/families/index.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import {
  type ComplexMatrix,
  diagonal,
  fromRows,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
} from '../../src/linalg/complex-matrix.js';
import { hermitianPower } from '../../src/linalg/matrix-function.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { referenceState } from '../../src/structure/reference-state.js';
import { analyse } from '../../src/structure/structure.js';
import { symmetryOf } from '../../src/structure/symmetry.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { kmsQubit } from '../helpers/kms-qubit.js';

/** Largest |Tr σ^{1−s} L(A)* σ^s B − Tr σ^{1−s} A* σ^s L(B)| over a basis: the definition, written out. */
function definitionResidual(g: Generator, sigma: ComplexMatrix, s: number): number {
  const left = hermitianPower(sigma, 1 - s);
  const right = s > 0 ? hermitianPower(sigma, s) : null;
  const form = (a: ComplexMatrix, b: ComplexMatrix) => innerProduct(multiply(a, left), right ? multiply(right, b) : b);
  const basis = Array.from({ length: g.algebra.dimension }, (_, k) => basisElement(g.algebra, k));
  const images = basis.map((b) => applyGenerator(g, b));
  let worst = 0;
  basis.forEach((a, i) =>
    basis.forEach((b, j) => {
      const x = form(images[i], b);
      const y = form(a, images[j]);
      worst = Math.max(worst, Math.hypot(x.re - y.re, x.im - y.im));
    }),
  );
  return worst;
}

describe('symmetryOf', () => {
  it('finds the trace symmetry of a depolarising qutrit', () => {
    const g = expectationGenerator({ algebra: blockAlgebra([3]), onto: { scalars: true } });
    expect(symmetryOf(g, referenceState(g)).kind).toBe('tracial');
  });

  it('finds GNS symmetry, and agrees with the definition', () => {
    const g = thermalQubit({ beta: 1.3 });
    const state = referenceState(g);
    const found = symmetryOf(g, state);
    expect(found.kind).toBe('GNS');
    expect(found.residuals.tracial).toBeGreaterThan(0.1);
    expectBelow(definitionResidual(g, state.sigma, 0), 1e-14, 'GNS form');
  });

  it('tells KMS from GNS, and agrees with the definitions', () => {
    const g = kmsQubit();
    const state = referenceState(g);
    const found = symmetryOf(g, state);
    expect(found.kind).toBe('KMS');
    expectBelow(found.residuals.kms, 1e-13, 'KMS residual');
    expect(found.residuals.gns).toBeGreaterThan(0.01);
    expectBelow(definitionResidual(g, state.sigma, 0.5), 1e-13, 'KMS form');
    expect(definitionResidual(g, state.sigma, 0)).toBeGreaterThan(0.01);
  });

  it('reports none for a chain that turns round', () => {
    const g = ratesGenerator([[0, 2, 1], [1, 0, 2], [2, 1, 0]]); // prettier-ignore
    const found = symmetryOf(g, referenceState(g));
    expect(found.kind).toBe('none');
    expect(found.residuals.kms).toBeGreaterThan(0.1);
  });

  it('reports none with a Hamiltonian part, and none for a state that is not faithful', () => {
    const sx = fromRows([[0, 1], [1, 0]]); // prettier-ignore
    const turning = lindbladGenerator({
      algebra: blockAlgebra([2]),
      hamiltonian: diagonal([1, -1]),
      jumps: [{ matrix: sx }],
    });
    expect(symmetryOf(turning, referenceState(turning)).kind).toBe('none');
    const decay = lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [{ matrix: fromRows([[0, 1], [0, 0]]) }] }); // prettier-ignore
    expect(symmetryOf(decay, referenceState(decay)).kind).toBe('none');
  });

  it('allows for what small weights in a rotated basis lose, and says so', () => {
    for (const levels of [6, 12]) {
      const ladder = truncatedOscillator({ levels, beta: 2.2 });
      const u = randomUnitary(seededRandom(levels), levels);
      const rotate = (a: ComplexMatrix) => multiplyAdjointFirst(u, multiply(a, u));
      const jumps = ladder.jumps.map(({ label, matrix }) => ({
        label,
        matrix: sparseFromDense(rotate(denseFromSparse(matrix))),
      }));
      const { symmetry, canonical, notes } = analyse({ ...ladder, jumps, declaredState: null });
      expect(symmetry.kind, `${levels} levels`).toBe('GNS');
      expect(canonical?.jumps.map((jump) => jump.label)).toEqual(['a', 'a*']);
      expectClose(canonical?.jumps[0].frequency ?? NaN, -2.2, 1e-5, `frequency with ${levels} levels`);
      if (levels === 6) expect(notes).toEqual([]);
      else expect(notes.join()).toMatch(/eigenvalues down to 2\.75e-11: the symmetry is accepted with a residual of/);
    }
  });

  it('probes large algebras, and finds the same there', () => {
    const large = localDepolarising(6);
    expect(symmetryOf(large, referenceState(large))).toMatchObject({ kind: 'tracial', probed: true });
    const thermal = tensorGenerator(Array.from({ length: 6 }, () => thermalQubit({ beta: 1 })));
    expect(symmetryOf(thermal, referenceState(thermal))).toMatchObject({ kind: 'GNS', probed: true });
    const tilted = lindbladGenerator({
      algebra: blockAlgebra([64]),
      hamiltonian: pauliString('ZZIIII'),
      jumps: large.jumps,
    });
    const found = symmetryOf(tilted, referenceState(tilted));
    expect(found.kind).toBe('none');
    expect(found.residuals.tracial).toBeGreaterThan(0.01);
  });
});
