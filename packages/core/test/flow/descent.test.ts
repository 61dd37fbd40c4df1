import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { descend, type DescentEnds } from '../../src/flow/index.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { diagonal, fromRows } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import type { End } from '../../src/sheet/bracket.js';
import { computeSheet } from '../../src/sheet/compute-sheet.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { depolarising, dephasing, generalisedDepolarising, randomChain, randomDavies } from '../entropy/models.js';
import { randomState } from '../entropy/random-states.js';
import { expectError } from '../helpers/expect-error.js';
import { kmsQubit } from '../helpers/kms-qubit.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

const random = seededRandom('descent');
/** No symmetry at all: a rotation beside unequal jumps. */
const driven = analyse(
  lindbladGenerator({
    algebra: blockAlgebra([2]),
    hamiltonian: fromRows([[0.4, 0.7], [0.7, -0.4]]), // prettier-ignore
    jumps: [{ matrix: fromRows([[0, 1], [0, 0]]) }, { matrix: fromRows([[0, 0], [0.5, 0]]) }], // prettier-ignore
  }),
);
/** Two components of a chain. */
const split = analyse(
  ratesGenerator([[0, 1, 0, 0], [2, 0, 0, 0], [0, 0, 0, 0.5], [0, 0, 0.7, 0]]), // prettier-ignore
);

const MODELS: readonly (readonly [string, Structure])[] = [
  ['depolarising qubit', depolarising(2)],
  ['dephasing, not primitive', dephasing(3)],
  ['thermal, with a flow between blocks', randomDavies([2, 1], random)],
  ['chain', randomChain(4, random)],
  ['chain of two components', split],
  ['KMS-symmetric only', analyse(kmsQubit())],
  ['no symmetry', driven],
];

/** Lower ends of a sheet without searches. */
function provedEnds(structure: Structure): DescentEnds {
  const rows = (['gap', 'ge', 'cge', 'mlsi', 'clsi'] as const).map((id) => ({ id }));
  const sheet = computeSheet(structure, { rows, seed: 1, randomStarts: 0, epsilon: 0.01 });
  return Object.fromEntries(sheet.map(({ key, lower }) => [key.id, lower]));
}

describe.each(MODELS)('%s', (_name, structure) => {
  const rho = randomState(structure.algebra, random);

  it('loses entropy at the rate of its production, to 1e-8', () => {
    // Five-point differences of D around the middle of short flows, each begun where a long one has come.
    const h = 5e-4;
    for (const { state, time } of descend(structure, rho, { until: 3, points: 7 }).points) {
      const { points } = descend(structure, state, { until: 4 * h, points: 5 });
      const [a, b, middle, c, d] = points;
      const slope = (a.entropy - 8 * b.entropy + 8 * c.entropy - d.entropy) / (12 * h);
      expectClose(-slope, middle.production, 1e-8, `production at t = ${time}`);
    }
  });

  it('stays below every bound of a proved constant', () => {
    const { bounds, points } = descend(structure, rho, { until: 20, points: 60 }, provedEnds(structure));
    expect(bounds.length).toBeGreaterThan(0);
    expect(points.at(-1)?.entropy).toBeLessThan(points[0].entropy);
    expect(points.every(({ entropy, distance }) => entropy >= 0 && distance >= 0)).toBe(true);
  });

  it('does not move from its limit', () => {
    const { limit } = descend(structure, rho, { until: 1, points: 2 });
    const { points } = descend(structure, limit, { until: 5, points: 4 });
    for (const { entropy, production, distance } of points) expect([entropy, production, distance]).toEqual([0, 0, 0]);
  });
});

describe('closed forms', () => {
  /** D of a qubit with Bloch vector of length r to the maximally mixed state, as a series that is exact to 1e-17 for r < 0.01. */
  const seriesEntropy = (r: number): number => r ** 2 / 2 + r ** 4 / 12 + r ** 6 / 30 + r ** 8 / 56;

  it('keeps relative accuracy down to the smallest entropies (depolarising qubit, r_t = e^{−t}r)', () => {
    const { points, method } = descend(depolarising(2), diagonal([0.8, 0.2]), { until: 150, points: 31 });
    expect(method).toBe('eigenvectors');
    for (const { time, entropy, production, distance } of points.slice(1)) {
      const r = 0.6 * Math.exp(-time);
      expectClose(entropy / seriesEntropy(r), 1, 1e-13, `D at t = ${time}`);
      expectClose(production / (r * Math.atanh(r)), 1, 1e-13, `I at t = ${time}`);
      expectClose(distance / r, 1, 1e-13, `distance at t = ${time}`);
    }
    expect(points.at(-1)?.entropy).toBeLessThan(1e-128);
  });

  it('follows two points with rates p, q: e^{−(p+q)t} towards (q, p)/(p+q)', () => {
    const structure = analyse(ratesGenerator([[0, 0.5], [1.5, 0]])); // prettier-ignore
    const { points } = descend(structure, diagonal([1, 0]), { until: 10, points: 11 });
    for (const { time, state, distance } of points) {
      expectClose(state.re[0], 0.75 + 0.25 * Math.exp(-2 * time), 1e-15, `population at t = ${time}`);
      expectClose(distance, 0.5 * Math.exp(-2 * time), 1e-15, `distance at t = ${time}`);
    }
  });

  it('leaves the diagonal alone under dephasing', () => {
    const rho = randomState(blockAlgebra([3]), random);
    const { limit, primitive } = descend(dephasing(3), rho, { until: 1, points: 3 });
    expect(primitive).toBe(false);
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < 3; j++) expectClose(limit.re[3 * i + j], i === j ? rho.re[3 * i + j] : 0, 1e-14, 'limit');
    }
  });
});

describe('the boundary of state space', () => {
  it('gives an infinite production where the flow leaves it, and finite entropies', () => {
    const { points } = descend(generalisedDepolarising([0.7, 0.3]), diagonal([0, 1]), { until: 2, points: 5 });
    expectClose(points[0].entropy, -Math.log(0.3), 1e-15, 'D');
    expect(points[0].production).toBe(Infinity);
    expect(points.slice(1).every(({ production }) => Number.isFinite(production))).toBe(true);
  });

  it('stays finite where the limit itself has no full support', () => {
    const { points } = descend(split, diagonal([1, 0, 0, 0]), { until: 3, points: 4 });
    // Rates 1 and 2: the limit of the first component is (2/3, 1/3).
    expectClose(points[0].entropy, -Math.log(2 / 3), 1e-14, 'D');
    expect(points.every(({ entropy }) => Number.isFinite(entropy))).toBe(true);
    expect(points.slice(1).every(({ production }) => production > 0 && Number.isFinite(production))).toBe(true);
  });
});

describe('bounds', () => {
  const end = (value: number): End => ({ value, grade: 'certified', by: 'a test' });
  const rho = diagonal([0.9, 0.1]);
  const times = { until: 3, points: 13 };

  it('are met with equality by the gap of a depolarising qubit, in trace distance', () => {
    const { bounds, points } = descend(depolarising(2), rho, times, { gap: end(1) });
    const bound = bounds.find(({ quantity }) => quantity === 'distance');
    expect(bound?.rate).toBe(1);
    points.forEach(({ distance, time }) => {
      expectClose((bound?.prefactor ?? NaN) * Math.exp(-time), distance, 1e-14, 'bound');
    });
  });

  it('of observed and of non-positive ends are not drawn', () => {
    const ends = { gap: { ...end(1), grade: 'observed' as const }, mlsi: end(0), ge: end(-1), cge: end(-Infinity) };
    expect(descend(depolarising(2), rho, times, ends).bounds).toEqual([]);
  });

  it.each([
    ['mlsi', 'D'],
    ['clsi', 'D'],
    ['ge', 'I'],
    ['gap', 'D'],
  ] as const)('crossed by the flow are an internal error: %s too large', (constant, quantity) => {
    const error = expectError(
      () => descend(depolarising(2), rho, times, { [constant]: end(1.3) }),
      'internal',
      /the flow crosses a bound that is said to be proved.*report/s,
    );
    expect(error.message).toContain(`${quantity}(ρ_t`);
    expect(error.details?.constant).toBe(constant);
  });

  it('are not crossed by rounding: the exact constants of a depolarising qubit', () => {
    const ends = { gap: end(1), mlsi: end(1), ge: end(1) };
    expect(descend(depolarising(2), rho, { until: 60, points: 200 }, ends).bounds).toHaveLength(5);
  });
});

describe('refusals', () => {
  const structure = depolarising(2);
  const times = { until: 1, points: 3 };

  it.each([-1, 0, NaN, Infinity])('a time of %s', (until) => {
    expectError(() => descend(structure, diagonal([1, 0]), { until, points: 3 }), 'usage', /time above 0/);
  });

  it.each([1, 2.5, 10_001])('%s points', (points) => {
    expectError(() => descend(structure, diagonal([1, 0]), { until: 1, points }), 'usage', /2 to 10000 points/);
  });

  it('a state of another dimension, of another trace, or not positive', () => {
    expectError(() => descend(structure, diagonal([1, 0, 0]), times), 'dimension-mismatch', /2×2/);
    expectError(() => descend(structure, diagonal([1, 1]), times), 'state-not-positive', /trace/);
    expectError(() => descend(structure, diagonal([1.5, -0.5]), times), 'state-not-positive', /positive state/);
  });

  it('a generator without a faithful invariant state', () => {
    const decay = analyse(lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [{ matrix: fromRows([[0, 1], [0, 0]]) }] })); // prettier-ignore
    expectError(() => descend(decay, diagonal([0, 1]), times), 'not-supported', /faithful invariant state/);
  });

  it('a time that would take too many Taylor steps', () => {
    const large = analyse(
      lindbladGenerator({
        algebra: blockAlgebra([17]),
        hamiltonian: fromRows(Array.from({ length: 17 }, (_, i) => Array.from({ length: 17 }, (_, j) => Number(Math.abs(i - j) === 1)))), // prettier-ignore
        jumps: [{ matrix: diagonal(Array.from({ length: 17 }, (_, i) => i)) }],
      }),
    );
    expectError(() => descend(large, diagonal([1, ...Array<number>(16).fill(0)]), { until: 1e6, points: 3 }), 'too-large', /shorter one/); // prettier-ignore
    const { method } = descend(large, diagonal([1, ...Array<number>(16).fill(0)]), { until: 0.01, points: 3 });
    expect(method).toBe('Taylor steps');
  });

  it('what is no Markov semigroup', () => {
    const bad = expectationGenerator({ algebra: blockAlgebra([2]), onto: { scalars: true } });
    const negated = analyse({ ...bad, jumps: [], superoperator: Float64Array.from([1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1]) }); // prettier-ignore
    expectError(() => descend(negated, diagonal([1, 0]), times), 'not-completely-positive', /Markov semigroup/);
  });
});

it('propagates alike by eigenvectors and by matrix exponentials', () => {
  const structure = randomDavies([2, 1], random);
  const rho = randomState(structure.algebra, random);
  const times = { until: 4, points: 9 };
  const spectral = descend(structure, rho, times);
  const plain = descend({ ...structure, symmetry: { ...structure.symmetry, kind: 'none' } }, rho, times);
  expect([spectral.method, plain.method]).toEqual(['eigenvectors', 'matrix exponential']);
  plain.points.forEach((point, k) => {
    const other = spectral.points[k];
    const gap = Math.max(...point.state.re.map((x, i) => Math.abs(x - other.state.re[i])));
    expectBelow(gap, 1e-13 + point.stateError + other.stateError, `states at t = ${point.time}`);
    expectClose(point.entropy / other.entropy, 1, 1e-9, `D at t = ${point.time}`);
  });
});
