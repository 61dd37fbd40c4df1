import { describe, expect, it } from 'vitest';
import { blockAlgebra, fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { sumGenerator } from '../../src/generator/sum-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import {
  dephasing,
  depolarising,
  generalisedDepolarising,
  localDepolarising,
  pauliJumps,
  thermalQubit,
} from '../../src/families/index.js';
import {
  type ComplexMatrix,
  diagonal,
  frobeniusNorm,
  fromRows,
  hermitianPart,
  identity,
  innerProduct,
  kronecker,
  multiply,
  multiplyAdjointSecond,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { expmReal } from '../../src/linalg/expm-real.js';
import { hermitianPower } from '../../src/linalg/matrix-function.js';
import { seededRandom } from '../../src/random.js';
import { type FixedPoints, fixedPoints } from '../../src/structure/fixed-points.js';
import { kernelPair, projectionFactor } from '../../src/structure/kernel.js';
import { primitiveByCholesky } from '../../src/structure/primitive.js';
import { referenceState } from '../../src/structure/reference-state.js';
import { symmetryOf } from '../../src/structure/symmetry.js';
import { expectError } from '../helpers/expect-error.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { randomMatrix, randomUnitary } from '../linalg/support/inputs.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

function fixedOf(g: Generator): FixedPoints {
  const state = referenceState(g);
  const found = fixedPoints(g, state, symmetryOf(g, state));
  expect(found).not.toBeNull();
  return found as FixedPoints;
}

/** E(A) for Hermitian A. */
function expectationOf(g: Generator, { expectation }: FixedPoints, a: ComplexMatrix): ComplexMatrix {
  const d = g.algebra.dimension;
  const x = toCoordinates(g.algebra, a);
  const y = Float64Array.from({ length: d }, (_, k) => x.reduce((sum, v, l) => sum + expectation[k * d + l] * v, 0));
  return fromCoordinates(g.algebra, y);
}

/** E E = E, L E = E L = 0, E(1) = 1, and e^{tL} → E. */
function expectLaws(g: Generator, found: FixedPoints, what: string): void {
  const d = g.algebra.dimension;
  const e = found.expectation;
  const l = generatorMatrix(g);
  const size = Math.sqrt(l.reduce((sum, x) => sum + x * x, 0));
  const product = (a: Float64Array, b: Float64Array) =>
    Float64Array.from({ length: d * d }, (_, at) => {
      let sum = 0;
      for (let k = 0; k < d; k++) sum += a[Math.floor(at / d) * d + k] * b[k * d + (at % d)];
      return sum;
    });
  const worst = (a: Float64Array, b?: Float64Array) =>
    a.reduce((top, x, k) => Math.max(top, Math.abs(x - (b ? b[k] : 0))), 0);
  expectBelow(worst(product(e, e), e), 1e-11, `${what}: E² − E`);
  expectBelow(worst(product(l, e)), 1e-11 * (1 + size), `${what}: LE`);
  expectBelow(worst(product(e, l)), 1e-11 * (1 + size), `${what}: EL`);
  const one = identity(g.algebra.size);
  expectBelow(frobeniusNorm(subtract(expectationOf(g, found, one), one)), 1e-11, `${what}: E(1) − 1`);
  expect(found.basis.length).toBe(found.dimension);
  found.basis.forEach((b, i) =>
    found.basis.forEach((c, j) =>
      expectClose(innerProduct(b, c).re, i === j ? 1 : 0, 1e-12, `${what}: basis ${i},${j}`),
    ),
  );
  found.basis.forEach((b) =>
    expectBelow(frobeniusNorm(applyGenerator(g, b)), 1e-11 * (1 + size), `${what}: L on the basis`),
  );
}

describe('fixed-point algebras of known kind', () => {
  const known: [string, Generator, number[]][] = [
    ['depolarising qutrit', depolarising(3), [1]],
    ['dephasing of three levels', dephasing(3), [1, 1, 1]],
    [
      'blocks 2 and 1 of a qutrit',
      expectationGenerator({ algebra: blockAlgebra([3]), onto: { blocks: [2, 1] } }),
      [1, 2],
    ],
    [
      'a qubit left alone',
      tensorGenerator([depolarising(2), expectationGenerator({ algebra: blockAlgebra([2]), onto: { blocks: [2] } })]),
      [2],
    ],
    ['parity of two qubits', pauliJumps([{ string: 'ZZ', rate: 1 }]), [2, 2]],
    ['collective dephasing of two qubits', lindbladGenerator({ algebra: blockAlgebra([4]), jumps: [{ matrix: fromRows([[2, 0, 0, 0], [0, 0, 0, 0], [0, 0, 0, 0], [0, 0, 0, -2]]) }] }), [1, 1, 2]], // prettier-ignore
    ['nothing moves', lindbladGenerator({ algebra: blockAlgebra([2, 1]), jumps: [] }), [1, 2]],
    ['two dephasings in different bases', sumGenerator([{ weight: 1, generator: pauliJumps([{ string: 'X', rate: 1 }]) }, { weight: 2, generator: pauliJumps([{ string: 'Z', rate: 1 }]) }]), [1]], // prettier-ignore
    ['one point', expectationGenerator({ algebra: blockAlgebra([1]), onto: { scalars: true } }), [1]],
  ];
  for (const [name, g, blocks] of known) {
    it(name, () => {
      const found = fixedOf(g);
      expect(found.blocks).toEqual(blocks);
      expect(found.dimension).toBe(blocks.reduce((sum, n) => sum + n * n, 0));
      expect(found.primitive).toBe(found.dimension === 1);
      expectLaws(g, found, name);
    });
  }

  it('is found in any basis: an algebra [2]⊗1 ⊕ [1] inside M_5, rotated', () => {
    const random = seededRandom('hidden algebra');
    const u = randomUnitary(random, 5);
    const hidden = [0, 1, 2].map(() => {
      // Jumps from the commutant 1_2⊗M_2 ⊕ C of M_2⊗1 ⊕ C.
      const a = randomMatrix(random, 2);
      const inside = kronecker(identity(2), a);
      const full = fromRows(new Array(5).fill(new Array(5).fill(0)));
      for (let i = 0; i < 4; i++) {
        for (let j = 0; j < 4; j++) {
          full.re[i * 5 + j] = inside.re[i * 4 + j];
          full.im[i * 5 + j] = inside.im[i * 4 + j];
        }
      }
      full.re[24] = random.normal();
      return { matrix: multiplyAdjointSecond(multiply(u, full), u) };
    });
    const g = lindbladGenerator({ algebra: blockAlgebra([5]), jumps: hidden });
    const found = fixedOf(g);
    expect(found.blocks).toEqual([1, 2]);
    expectLaws(g, found, 'hidden algebra');
  });
});

describe('the projection onto fixed points', () => {
  it('is the limit of e^{tL}, with and without symmetry', () => {
    const random = seededRandom('limits');
    const turning = lindbladGenerator({
      algebra: blockAlgebra([3]),
      hamiltonian: hermitianPart(randomMatrix(random, 3)),
      jumps: [{ matrix: randomMatrix(random, 3) }],
    });
    for (const g of [turning, dephasing(2), thermalQubit({ beta: 2 })]) {
      const d = g.algebra.dimension;
      const late = expmReal(
        generatorMatrix(g).map((x) => 200 * x),
        d,
      );
      const e = fixedOf(g).expectation;
      expectBelow(
        late.reduce((top, x, k) => Math.max(top, Math.abs(x - e[k])), 0),
        1e-9,
        'e^{tL} − E',
      );
    }
  });

  it('is orthogonal in the KMS product of a GNS-symmetric generator', () => {
    for (let seed = 0; seed < 12; seed++) {
      const { generator: g, sigma } = randomBalancedGenerator(
        blockAlgebra([[3], [2, 1], [2, 2]][seed % 3]),
        seededRandom(`E${seed}`),
      );
      const found = fixedOf(g);
      expectLaws(g, found, `seed ${seed}`);
      const quarter = hermitianPower(sigma, 0.25);
      const picture = (a: ComplexMatrix) => multiply(quarter, multiply(a, quarter));
      const random = seededRandom(seed);
      const draw = () =>
        fromCoordinates(
          g.algebra,
          Float64Array.from({ length: g.algebra.dimension }, () => random.normal()),
        );
      const [a, b] = [draw(), draw()];
      const left = innerProduct(picture(expectationOf(g, found, a)), picture(b)).re;
      const right = innerProduct(picture(a), picture(expectationOf(g, found, b))).re;
      expectClose(left, right, 1e-11, `seed ${seed}: <EA,B> − <A,EB>`);
    }
  });
});

describe('algebras above the quick size', () => {
  it('prove primitivity by a Cholesky factorisation, with the projection that the kernel gives', () => {
    const weights = Array.from({ length: 17 }, (_, k) => Math.exp(-k / 4));
    const total = weights.reduce((sum, w) => sum + w, 0);
    const g = generalisedDepolarising(diagonal(weights.map((w) => w / total)));
    const state = referenceState(g);
    expect(primitiveByCholesky(g, state)).toBe(true);
    const found = fixedOf(g);
    expect(found).toMatchObject({ dimension: 1, primitive: true });
    const { right, left } = kernelPair(generatorMatrix(g), 289);
    const factor = projectionFactor(right, left);
    let worst = 0;
    for (let k = 0; k < 289; k++) {
      for (let l = 0; l < 289; l++)
        worst = Math.max(worst, Math.abs(right[0][k] * factor[l] - found.expectation[k * 289 + l]));
    }
    expectBelow(worst, 1e-12, 'E − X(YᵀX)⁻¹Yᵀ');
  });

  it('turn to the kernel where that proves nothing', () => {
    const g = dephasing(17);
    expect(primitiveByCholesky(g, referenceState(g))).toBe(false);
    expect(fixedOf(g).blocks).toEqual(new Array<number>(17).fill(1));
  });

  it('are found primitive without symmetry too', () => {
    const random = seededRandom('no symmetry');
    const jumps = [{ matrix: randomMatrix(random, 17) }];
    const g = lindbladGenerator({
      algebra: blockAlgebra([17]),
      hamiltonian: hermitianPart(randomMatrix(random, 17)),
      jumps,
    });
    expect(primitiveByCholesky(g, referenceState(g))).toBe(true);
    expect(kernelPair(generatorMatrix(g), 289).dimension).toBe(1);
  });
});

describe('large algebras', () => {
  it('finds a primitive tensor product from its factors, and one given flat by search', () => {
    const g = localDepolarising(6);
    for (const model of [g, { ...g, origin: { kind: 'lindblad' as const } }]) {
      const found = fixedOf(model);
      expect({ dimension: found.dimension, primitive: found.primitive }).toEqual({ dimension: 1, primitive: true });
      expectError(() => found.expectation, 'too-large', /at most 1024/);
    }
  });

  it('does not claim to know the fixed points of a large generator that is not primitive', () => {
    const g = pauliJumps(['ZIIIII', 'IZIIII', 'IIXIII'].map((string) => ({ string, rate: 1 })));
    const state = referenceState(g);
    expect(fixedPoints(g, state, symmetryOf(g, state))).toBeNull();
  });
});
