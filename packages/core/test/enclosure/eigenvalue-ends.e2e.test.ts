import { beforeAll, describe, expect, test } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { completeBakryEmery } from '../../src/constants/bakry-emery.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { encloseCompleteBakryEmery } from '../../src/enclosure/enclose-bakry-emery.js';
import { encloseGap } from '../../src/enclosure/enclose-gap.js';
import { encloseForms } from '../../src/enclosure/enclosed-forms.js';
import { completeGraph } from '../../src/families/complete-graph.js';
import { cycle } from '../../src/families/cycle.js';
import { dephasing } from '../../src/families/dephasing.js';
import { depolarising } from '../../src/families/depolarising.js';
import { pauliJumps } from '../../src/families/pauli-jumps.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { fromEntries, hermitianPart } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse, type Structure } from '../../src/structure/structure.js';
import { exactInertia } from './exact-inertia.js';

const WELL_CONDITIONED = 1e-10;

/** Milliseconds that the reference may take on a busy machine; three seconds are usual. */
const REFERENCE_TIME = 120_000;

/** Random Hermitian jumps, so many that the forms vanish on the multiples of the identity alone. */
function randomJumps(seed: string, n: number, count: number): Generator {
  const random = seededRandom(`enclosed ${seed}`);
  const jumps = Array.from({ length: count }, () => ({
    matrix: hermitianPart(fromEntries(n, n, () => [random.normal(), random.normal()])),
  }));
  return lindbladGenerator({ algebra: blockAlgebra([n]), jumps });
}

/** Random symmetric rates between n points. */
function randomChain(seed: string, n: number): Generator {
  const random = seededRandom(`enclosed chain ${seed}`);
  const rates = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) rates[i][j] = rates[j][i] = 0.2 + random.uniform();
  return ratesGenerator(rates);
}

const jumpsOf = ({ canonical }: Structure) => (canonical?.jumps ?? []).map(({ matrix }) => matrix);

const MODELS: readonly (readonly [string, Generator])[] = [
  ['depolarising qubit', depolarising(2)],
  ['depolarising three levels', depolarising(3)],
  ['dephasing three levels', dephasing(3)],
  ['Pauli pair', pauliJumps([{ string: 'X', rate: 0.5 }, { string: 'Z', rate: 0.25 }])], // prettier-ignore
  ['cycle of four points', cycle(4)],
  ['complete graph of four points', completeGraph(4)],
  ...[1, 2, 3, 4].map((k) => [`random qubit ${k}`, randomJumps(String(k), 2, 3 + k)] as const),
  ...[1, 2].map((k) => [`random three levels ${k}`, randomJumps(`three ${k}`, 3, 2 + k)] as const),
  ...[1, 2, 3].map((k) => [`random chain ${k}`, randomChain(String(k), 2 + k)] as const),
];

describe('the gap lies in its enclosure: eigenvalues of −L below each end, counted in rational arithmetic', () => {
  const found = MODELS.map(([name, generator]) => {
    const structure = analyse(generator);
    const enclosure = encloseGap(structure);
    if (!enclosure) throw new Error(`expected an enclosure of the gap of ${name}`);
    return { name, structure, ...enclosure };
  });
  let counted: [number, number][][] = [];
  beforeAll(() => {
    counted = exactInertia(
      found.map(({ structure, lo, hi }) => ({
        form: 'gap',
        blocks: structure.algebra.blocks,
        jumps: jumpsOf(structure),
        bounds: [lo, hi],
      })),
    );
  }, REFERENCE_TIME);

  test.each(found.map((x, k) => [x.name, x, k] as const))('%s', (_, { structure, lo, hi }, k) => {
    const [below, above] = counted[k];
    expect(structure.symmetry.kind).toBe('tracial');
    expect(below).toEqual([structure.fixedPoints?.dimension, 0]);
    expect(above[0] + above[1]).toBeGreaterThan(below[0]);
    expect((hi - lo) / hi).toBeLessThan(WELL_CONDITIONED);
  });
});

describe('cbe lies in its enclosure: Γ₂ − KΓ is positive at the lower end and not at the upper, in rational arithmetic', () => {
  // Forms of side 27 and more take rational elimination too long.
  const found = MODELS.filter(([, { algebra }]) => algebra.dimension * Math.max(...algebra.blocks) < 27).map(
    ([name, generator]) => {
      const structure = analyse(generator);
      const forms = encloseForms(structure);
      if (!forms) throw new Error(`expected enclosed forms of ${name}`);
      return { name, structure, ...encloseCompleteBakryEmery(forms, completeBakryEmery(carreDuChamp(generator))) };
    },
  );
  let counted: [number, number][][] = [];
  beforeAll(() => {
    counted = exactInertia(
      found.map(({ structure, lower, upper }) => ({
        form: 'curvature',
        blocks: structure.algebra.blocks,
        jumps: jumpsOf(structure),
        bounds: [lower ?? NaN, upper ?? NaN],
      })),
    );
  }, REFERENCE_TIME);

  test.each(found.map((x, k) => [x.name, x, k] as const))('%s', (_, { lower, upper }, k) => {
    const [below, above] = counted[k];
    expect(lower).not.toBeNull();
    expect(upper).not.toBeNull();
    expect(below[0]).toBe(0);
    expect(above[0]).toBeGreaterThan(0);
    expect(((upper ?? NaN) - (lower ?? NaN)) / Math.abs(upper ?? NaN)).toBeLessThan(WELL_CONDITIONED);
  });
});
