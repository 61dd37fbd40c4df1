import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { gradientEstimateAt } from '../../src/constants/gradient-estimate.js';
import { thermalQubit } from '../../src/families/thermal-qubit.js';
import { truncatedOscillator } from '../../src/families/truncated-oscillator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { type ComplexMatrix, diagonal, fromRows, frobeniusNorm, subtract } from '../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import { seededRandom } from '../../src/random.js';
import {
  blochDisc,
  curvatureOn,
  eigenvalueTriangle,
  evaluateRings,
  LAST_RING,
  lowestPoint,
  placeOn,
  planeThrough,
  reachOf,
  reliefGrid,
  stateOn,
  type StateSlice,
  usualPlane,
} from '../../src/relief/index.js';
import { metricOf } from '../../src/sheet/run-sheet-task.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { depolarising, randomDavies } from '../entropy/models.js';
import { randomState } from '../entropy/random-states.js';
import { expectError } from '../helpers/expect-error.js';
import { expectClose } from '../linalg/support/expect-close.js';

const random = seededRandom('relief');
const smallest = (rho: ComplexMatrix): number => hermitianEigenvalues(rho)[0];
const sigmaOf = ({ state }: Structure): ComplexMatrix => (state as NonNullable<typeof state>).sigma;
const chain = analyse(ratesGenerator([[0, 1, 0.5], [2, 0, 1], [1, 1, 0]])); // prettier-ignore
const ladder = analyse(truncatedOscillator({ levels: 3, beta: 1 }));
const twoBlocks = randomDavies([2, 2], random);

function plane(structure: Structure): StateSlice {
  const states = [0, 1].map((k) => ({ name: `s${k}`, rho: randomState(structure.algebra, random) }));
  return planeThrough(structure.algebra, sigmaOf(structure), [states[0], states[1]]);
}

const SLICES: readonly (readonly [string, StateSlice])[] = [
  ['the Bloch disc', blochDisc(blockAlgebra([2]), ['x', 'z'])],
  ['the triangle of a chain', eigenvalueTriangle(chain.algebra, chain.state as NonNullable<typeof chain.state>)],
  [
    'the triangle of three levels',
    eigenvalueTriangle(ladder.algebra, ladder.state as NonNullable<typeof ladder.state>),
  ],
  ['a plane in two blocks', plane(twoBlocks)],
];

describe.each(SLICES)('%s', (_name, slice) => {
  it('is left by every ray exactly at the boundary of state space', () => {
    const reach = reachOf(slice);
    const [cx, cy] = slice.centre;
    for (let k = 0; k < 24; k++) {
      const angle = (2 * Math.PI * k) / 24 + 0.01;
      const at = (share: number) => {
        const r = share * reach(angle);
        return smallest(stateOn(slice, cx + r * Math.cos(angle), cy + r * Math.sin(angle)));
      };
      expectClose(at(1), 0, 1e-14, 'smallest eigenvalue at the rim');
      expect(at(0.999)).toBeGreaterThan(0);
      expect(at(1.001)).toBeLessThan(0);
    }
  });

  it('has orthogonal directions of one length, without trace', () => {
    const { horizontal: h, vertical: v } = slice;
    const inner = h.re.reduce((sum, x, k) => sum + x * v.re[k] + h.im[k] * v.im[k], 0);
    expectClose(inner, 0, 1e-14, 'inner product');
    expectClose(frobeniusNorm(h) / frobeniusNorm(v), 1, 1e-13, 'lengths');
  });

  it('has a grid inside, and marks where they say', () => {
    const grid = reliefGrid(slice, 600);
    expect(grid.x.length).toBe(grid.rings * grid.rays);
    for (let k = 0; k < grid.x.length; k += 7)
      expect(smallest(stateOn(slice, grid.x[k], grid.y[k]))).toBeGreaterThan(0);
    const last = (grid.rings - 1) * grid.rays;
    const [cx, cy] = slice.centre;
    // The polygon of the rim lies inside a curved boundary by less than its points are apart, squared.
    const ray = Math.atan2(grid.y[last + 5] - cy, grid.x[last + 5] - cx);
    const share = Math.hypot(grid.x[last + 5] - cx, grid.y[last + 5] - cy) / reachOf(slice)(ray);
    expectClose(share, LAST_RING, 1e-5, 'last ring');
    for (const { x, y } of slice.marks) expect(smallest(stateOn(slice, x, y))).toBeGreaterThan(-1e-14);
  });
});

describe('κ on a slice', () => {
  const slice = blochDisc(blockAlgebra([2]), ['x', 'z']);
  const model = metricOf(depolarising(2));

  it('is κ at its states', () => {
    const at = curvatureOn(metricOf(twoBlocks), 'logarithmic', SLICES[3][1]);
    const problem = { model: metricOf(twoBlocks), mean: 'logarithmic' as const, covariant: false };
    for (const [x, y] of [SLICES[3][1].centre, [0, 0], [0.05, 0.03]]) {
      expectClose(at(x, y), gradientEstimateAt(problem, stateOn(SLICES[3][1], x, y)).value, 1e-10, 'κ');
    }
  });

  it('depends on the radius alone for a depolarising qubit', () => {
    const at = curvatureOn(model, 'logarithmic', slice);
    for (const r of [0.2, 0.7, 0.99]) {
      for (const angle of [0.3, 2, 4.5]) {
        expectClose(at(r * Math.cos(angle), r * Math.sin(angle)), at(r, 0), 1e-11 * at(r, 0), `κ at radius ${r}`);
      }
    }
  });

  it('is not defined on the boundary and beyond it', () => {
    const at = curvatureOn(model, 'logarithmic', slice);
    expect([at(1, 0), at(0, -1), at(1.2, 0)]).toEqual([NaN, NaN, NaN]);
    expect(at(LAST_RING, 0)).toBeGreaterThan(1);
  });

  it('is the same in portions of rings as at once', () => {
    const grid = reliefGrid(slice, 300);
    const whole = evaluateRings(model, 'logarithmic', slice, grid, [0, grid.rings]);
    const parts = [[0, 3], [3, grid.rings]].flatMap(([from, to]) => [...evaluateRings(model, 'logarithmic', slice, grid, [from, to])]); // prettier-ignore
    expect(parts).toEqual([...whole]);
  });

  it('is lowest where the search for ge finds it: the depolarising qutrit, 0.9627109900', () => {
    const structure = depolarising(3);
    const triangle = eigenvalueTriangle(structure.algebra, structure.state as NonNullable<typeof structure.state>);
    const grid = reliefGrid(triangle, 600);
    const values = evaluateRings(metricOf(structure), 'logarithmic', triangle, grid, [0, grid.rings]);
    const lowest = lowestPoint(metricOf(structure), 'logarithmic', triangle, grid, values);
    expectClose(lowest?.kappa ?? NaN, 0.96271099, 1e-9, 'lowest κ');
    expect(lowest?.atRim).toBe(false);
  });

  it('says when it still falls at the rim, and when it is resolved nowhere', () => {
    const grid = reliefGrid(slice, 200);
    const falling = Float64Array.from(grid.x, (_, k) => -Math.floor(k / grid.rays));
    expect(lowestPoint(model, 'logarithmic', slice, grid, falling)?.atRim).toBe(true);
    expect(lowestPoint(model, 'logarithmic', slice, grid, falling.fill(NaN))).toBeNull();
  });
});

describe('placing states', () => {
  it('finds coordinates and distance', () => {
    const slice = blochDisc(blockAlgebra([2]), ['x', 'z']);
    const rho = fromRows([[0.7, 0.1], [0.1, 0.3]], [[0, -0.2], [0.2, 0]]); // prettier-ignore
    const { x, y, distance } = placeOn(slice, rho);
    expectClose(x, 0.2, 1e-15, 'x');
    expectClose(y, 0.4, 1e-15, 'z');
    expectClose(distance, 0.2 * Math.SQRT2, 1e-15, 'distance');
  });

  it('puts the states of a plane where its marks are', () => {
    const states = [0, 1].map((k) => ({ name: `s${k}`, rho: randomState(twoBlocks.algebra, random) }));
    const slice = planeThrough(twoBlocks.algebra, sigmaOf(twoBlocks), [states[0], states[1]]);
    slice.marks.forEach(({ x, y }, k) => {
      expect(frobeniusNorm(subtract(stateOn(slice, x, y), states[k].rho))).toBeLessThan(1e-14);
    });
    expectClose(placeOn(slice, sigmaOf(twoBlocks)).distance, 0, 1e-15, 'distance of σ');
  });

  it('fills a plane up from the slow mode and the levels', () => {
    const names = (slice: StateSlice): string[] => slice.marks.map(({ name }) => name);
    expect(names(usualPlane(twoBlocks, []))).toEqual(['slow mode', 'level 0']);
    const given = { name: 'given', rho: randomState(twoBlocks.algebra, random) };
    expect(names(usualPlane(twoBlocks, [given]))).toEqual(['given', 'slow mode']);
  });
});

describe('refusals', () => {
  it('of slices that are none', () => {
    const sigma = sigmaOf(twoBlocks);
    const named = (rho: ComplexMatrix, name = 'a') => ({ name, rho });
    const rho = randomState(twoBlocks.algebra, random);
    expectError(() => blochDisc(blockAlgebra([3]), ['x', 'z']), 'usage', /qubit/);
    expectError(() => blochDisc(blockAlgebra([2]), ['x', 'x']), 'usage', /two different Bloch axes/);
    expectError(() => eigenvalueTriangle(twoBlocks.algebra, twoBlocks.state as NonNullable<typeof twoBlocks.state>), 'usage', /three levels/); // prettier-ignore
    expectError(() => planeThrough(twoBlocks.algebra, sigma, [named(sigma), named(rho)]), 'usage', /is σ itself/);
    expectError(() => planeThrough(twoBlocks.algebra, sigma, [named(rho), named(rho)]), 'usage', /on a line/);
    expectError(() => usualPlane(twoBlocks, [named(sigma)]), 'usage', /is σ itself/);
  });

  it.each([99, 40_001, 1000.5, NaN])('of %s points', (points) => {
    expectError(() => reliefGrid(SLICES[0][1], points), 'usage', /100 to 40000 points/);
  });

  it('of a centre on the boundary', () => {
    expectError(() => reachOf({ ...SLICES[0][1], origin: diagonal([1, 0]) }), 'internal', /faithful/);
  });
});

it('κ at a state does not depend on the states evaluated before it', () => {
  const slice = blochDisc(blockAlgebra([2]), ['x', 'z']);
  const points = [[0.3, 0.4], [-0.5, 0.2], [0.1, -0.7], [0.6, 0.6], [0, 0.5]] as const; // prettier-ignore
  const values = (order: readonly number[]): number[] => {
    const at = curvatureOn(metricOf(analyse(thermalQubit({ beta: 1, gamma: 0.5 }))), 'logarithmic', slice);
    const found = new Map(order.map((k) => [k, at(points[k][0], points[k][1])]));
    return points.map((_, k) => found.get(k) ?? NaN);
  };
  expect(values([4, 2, 0, 3, 1])).toEqual(values([0, 1, 2, 3, 4]));
  expect(values([3, 0, 1, 2, 4])).toEqual(values([0, 1, 2, 3, 4]));
});
