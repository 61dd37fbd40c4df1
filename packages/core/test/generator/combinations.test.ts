import { describe, expect, it } from 'vitest';
import { blockAlgebra, fromCoordinates } from '../../src/algebra/block-algebra.js';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { sumGenerator } from '../../src/generator/sum-generator.js';
import { tensorAlgebra, tensorElement } from '../../src/generator/tensor-algebra.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { depolarising, pauliJumps, thermalQubit } from '../../src/families/index.js';
import {
  type ComplexMatrix,
  add,
  diagonal,
  frobeniusNorm,
  hermitianPart,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

const random = seededRandom('combinations');

/** One generator of each kind of part: Hamiltonian and jumps, superoperator, classical, several blocks. */
function parts(): Generator[] {
  return [
    lindbladGenerator({
      algebra: blockAlgebra([2]),
      hamiltonian: hermitianPart(randomMatrix(random, 2)),
      jumps: [{ label: 'R', matrix: randomMatrix(random, 2) }],
    }),
    expectationGenerator({ algebra: blockAlgebra([2, 1]), onto: { scalars: true }, rate: 0.7 }),
    ratesGenerator([[0, 1], [2, 0]]), // prettier-ignore
    randomBalancedGenerator(blockAlgebra([1, 2]), random).generator,
  ];
}

/** L_f on factor f of A_1 ⊗ … ⊗ A_F. */
function oneFactor(factors: readonly Generator[], f: number, elements: readonly ComplexMatrix[]) {
  const tensor = tensorAlgebra(factors.map((g) => g.algebra));
  return tensorElement(
    tensor,
    elements.map((a, k) => (k === f ? applyGenerator(factors[f], a) : a)),
  );
}

describe('tensorGenerator', () => {
  const all = parts();
  for (const chosen of [
    [0, 1],
    [1, 0],
    [1, 2],
    [2, 3],
    [3, 1],
    [0, 2, 1],
  ]) {
    // prettier-ignore
    it(`is the sum over factors on products, factors ${chosen.join()}`, () => {
      const factors = chosen.map((k) => all[k]);
      const g = tensorGenerator(factors);
      const tensor = tensorAlgebra(factors.map((f) => f.algebra));
      for (let trial = 0; trial < 4; trial++) {
        const elements = factors.map(({ algebra }) =>
          fromCoordinates(algebra, Float64Array.from({ length: algebra.dimension }, () => random.normal())),
        );
        const expected = factors.map((_, f) => oneFactor(factors, f, elements)).reduce(add);
        const image = applyGenerator(g, tensorElement(tensor, elements));
        expectBelow(frobeniusNorm(subtract(image, expected)), 1e-12 * (1 + frobeniusNorm(expected)), 'L(A⊗B)');
      }
    });
  }

  it('orders blocks lexicographically, and indices inside them', () => {
    const { algebra, position } = tensorAlgebra([blockAlgebra([2, 1]), blockAlgebra([1, 2])]);
    expect(algebra.blocks).toEqual([2, 4, 1, 2]);
    // Kronecker index 3i+k; block (0,0) holds i=0,1 with k=0.
    expect([...position]).toEqual([0, 2, 3, 1, 4, 5, 6, 7, 8]);
  });

  it('multiplies declared states, keeps labels and remembers its factors', () => {
    const factors = [thermalQubit({ beta: 1 }), depolarising(2)];
    const g = tensorGenerator(factors);
    expect(g.jumps.map((jump) => jump.label)).toEqual(['σ−(1)', 'σ+(1)']);
    expect(g.origin).toEqual({ kind: 'tensor', factors });
    const { values } = analyse(g).state as NonNullable<ReturnType<typeof analyse>['state']>;
    const excited = 1 / (1 + Math.E);
    expectAllClose(values, [(1 - excited) / 2, (1 - excited) / 2, excited / 2, excited / 2], 1e-15);
    expect(tensorGenerator([ratesGenerator([[0, 1], [1, 0]]), depolarising(2)]).declaredState).toBeNull(); // prettier-ignore
  });

  it('of one factor is that factor', () => {
    expectAllClose(generatorMatrix(tensorGenerator([all[1]])), generatorMatrix(all[1]), 1e-15);
  });

  it('names what is wrong', () => {
    expectError(() => tensorGenerator([]), 'usage', /at least one factor/, '/generator/factors');
    const big = pauliJumps([{ string: 'XIIIIIIIII', rate: 1 }]);
    expectError(
      () => tensorGenerator([big, depolarising(2)]),
      'too-large',
      /size at most 1024, got 2048/,
      '/generator/factors',
    );
    expectError(
      () => tensorGenerator([depolarising(8), depolarising(8)]),
      'too-large',
      /dimension at most 1024 for a tensor product .*got 4096/,
    );
  });
});

describe('sumGenerator', () => {
  it('is the weighted sum', () => {
    const algebra = blockAlgebra([2]);
    const terms = [
      { weight: 0.5, generator: parts()[0] },
      { weight: 2, generator: expectationGenerator({ algebra, onto: { diagonal: true } }) },
      { weight: 0, generator: thermalQubit({ beta: 3 }) },
      { weight: 1.5, generator: lindbladGenerator({ algebra, hamiltonian: diagonal([1, 2]), jumps: [] }) },
    ];
    const sum = generatorMatrix(sumGenerator(terms));
    const expected = new Float64Array(16);
    for (const { weight, generator } of terms)
      generatorMatrix(generator).forEach((v, k) => (expected[k] += weight * v));
    expectAllClose(sum, expected, 1e-13);
    expect(terms[0].generator.jumps[0].label).toBe('R');
  });

  it('keeps a declared state that the sum leaves invariant, and no other', () => {
    const warm = thermalQubit({ beta: 1 });
    const phase = pauliJumps([{ string: 'Z', rate: 1 }]);
    const kept = sumGenerator([{ weight: 1, generator: phase }, { weight: 1, generator: warm }]); // prettier-ignore
    expect(kept.declaredState).toBe(warm.declaredState);
    const lost = sumGenerator([{ weight: 1, generator: warm }, { weight: 1, generator: thermalQubit({ beta: 2 }) }]); // prettier-ignore
    expect(lost.declaredState).toBeNull();
  });

  it('names what is wrong', () => {
    expectError(() => sumGenerator([]), 'usage', /at least one term/, '/generator/terms');
    const generator = depolarising(2);
    expectError(
      () => sumGenerator([{ weight: -1, generator }]),
      'negative-rate',
      /a weight to be at least 0, got -1/,
      '/generator/terms/0/weight',
    );
    expectError(() => sumGenerator([{ weight: 1, generator }, { weight: 1, generator: depolarising(3) }]), 'dimension-mismatch', /algebra \[2\], got \[3\] in term 1/, '/generator/terms/1'); // prettier-ignore
  });
});
