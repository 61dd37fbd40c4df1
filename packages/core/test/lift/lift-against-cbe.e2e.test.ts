import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { zeros } from '../../src/linalg/complex-matrix.js';
import { bestCertificate } from '../helpers/best-certificate.js';
import { expectWithin } from '../helpers/bracket-of.js';
import { RANDOM_FAMILIES, randomSmallModel } from '../helpers/random-small-models.js';

const PROGRAM = fileURLToPath(new URL('../../../../tests/reference/chain_lift.py', import.meta.url));

/** Largest K of any lift of each chain, by CVXOPT over all linear maps of functions on edges. */
function referenceOptima(chains: readonly (readonly number[][])[]): number[] {
  const { status, stdout, stderr } = spawnSync('/usr/bin/python3', [PROGRAM], {
    input: JSON.stringify(chains),
    encoding: 'utf8',
    env: { ...process.env, OPENBLAS_NUM_THREADS: '1' },
  });
  expect(status, stderr).toBe(0);
  return JSON.parse(stdout) as number[];
}

/** Chains, two of them symmetric for the trace whose best lift stays below cbe. */
const CHAINS: Record<string, number[][]> = {
  'two points': [[0, 1], [2, 0]], // prettier-ignore
  'triangle with unequal rates': [[0, 1, 2], [1, 0, 3], [2, 3, 0]], // prettier-ignore
  'symmetric path of three points': [[0, 1, 0], [1, 0, 3], [0, 3, 0]], // prettier-ignore
  'symmetric path of four points': [[0, 1, 0, 0], [1, 0, 4, 0], [0, 4, 0, 1], [0, 0, 1, 0]], // prettier-ignore
  'reversible path of three points': [[0, 0.5, 0], [2, 0, 1], [0, 3, 0]], // prettier-ignore
};

describe('the full form of chains', () => {
  const reference = referenceOptima(Object.values(CHAINS));

  it.each(Object.entries(CHAINS).map(([name, rates], k) => [name, rates, reference[k]] as const))(
    '%s: no linear map of functions on edges does better',
    (_, rates, optimum) => {
      const { optimum: ours, cbe } = bestCertificate(ratesGenerator(rates));
      expectWithin(ours ?? NaN, optimum, 2e-6, 'optimum');
      expect(ours).toBeLessThanOrEqual(cbe + 1e-7);
    },
  );
});

/** Symmetric for the trace, with the full form below cbe by more than 1e-5: the bracket of cge stays open there. */
describe('tracial models whose full form stays below cbe', () => {
  it('a path of three points', () => {
    const { cbe, optimum, closed } = bestCertificate(ratesGenerator(CHAINS['symmetric path of three points']));
    expect(closed).toBe(false);
    expectWithin(cbe, -0.0413812651, 1e-9, 'cbe');
    expectWithin(optimum ?? NaN, -0.0627460669, 1e-8, 'optimum');
  });

  it('three levels with hopping between neighbours', () => {
    const jumps = [
      [0, 1],
      [1, 0],
      [1, 2],
      [2, 1],
    ].map(([a, b]) => {
      // prettier-ignore
      const matrix = zeros(3);
      matrix.re[3 * a + b] = 1;
      return { matrix, rate: 1 };
    });
    const { cbe, optimum, closed, grade } = bestCertificate(lindbladGenerator({ algebra: blockAlgebra([3]), jumps }));
    expect({ closed, grade }).toEqual({ closed: false, grade: 'exact' });
    expectWithin(cbe, 0.3, 1e-12, 'cbe');
    expectWithin(optimum ?? NaN, 0.286335345, 1e-8, 'optimum');
  });
});

describe('random small models', () => {
  it.each(Array.from({ length: 16 }, (_, k) => [k, randomSmallModel(k).family] as const))('%i: %s', (k, family) => {
    const { cbe, optimum, closed, bound, grade } = bestCertificate(randomSmallModel(k).generator);
    if (optimum === null) return expect(family).toBe(RANDOM_FAMILIES[5].name);
    const scale = Math.max(1, Math.abs(optimum));
    expect(optimum).toBeLessThanOrEqual(cbe + 1e-7 * scale);
    expect(grade).not.toBeNull();
    expect(bound).toBeLessThanOrEqual(optimum);
    expect(optimum - bound).toBeLessThan(1e-6 * scale);
    if (/^qubits|Weyl/.test(family)) expect(closed).toBe(true);
  });
});
