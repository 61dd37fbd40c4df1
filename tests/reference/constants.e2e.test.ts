import {
  type ComplexMatrix,
  type MeanName,
  type Structure,
  MEAN_NAMES,
  analyse,
  blockAlgebra,
  carreDuChamp,
  completeBakryEmery,
  entropyProduction,
  gradientEstimateAt,
  lsiAt,
  metricOf,
  mlsiAt,
} from '@thalweg/core';
import { describe, expect, it } from 'vitest';
import { blockEigen } from '../../packages/core/src/algebra/block-eigen.js';
import { operatorMean } from '../../packages/core/src/metric/operator-mean.js';
import { quotientAt } from '../../packages/core/src/metric/quotient.js';
import {
  type Answer,
  referenceAnswers,
  numberOf,
  writeMatrix,
} from '../../packages/core/test/helpers/ask-reference.js';
import { expectClose } from '../../packages/core/test/linalg/support/expect-close.js';
import { randomHermitian, randomState } from './support/random-forms.js';
import { randomModels } from './support/random-models.js';

const TOLERANCE = 1e-9;

/** k of M ⊗ M_k in the entropy quotients. */
const ANCILLA = 2;

interface Case {
  readonly name: string;
  readonly structure: Structure;
  readonly rho: ComplexMatrix;
  readonly observable: ComplexMatrix;
  /** A state of M ⊗ M_2. */
  readonly joint: ComplexMatrix;
  readonly requests: Readonly<Record<string, object>>;
}

/** Two states of every GNS-symmetric model. */
const CASES = randomModels().flatMap((model): Case[] => {
  if (!model.symmetric) return [];
  const { algebra } = model.generator;
  const joint = blockAlgebra(algebra.blocks.map((n) => n * ANCILLA));
  return [1, 2].map((index) => {
    const rho = randomState(model.random, algebra);
    const observable = randomHermitian(model.random, algebra);
    const drawn = { rho, observable, joint: randomState(model.random, joint) };
    const structure = analyse(model.generator);
    const name = `${model.name}, state ${index}`;
    return { name, structure, ...drawn, requests: requestsFor(model.document, drawn) };
  });
});

describe('constants at random states against NumPy', () => {
  const requests = CASES.flatMap((one) => Object.values(one.requests));
  const answers = referenceAnswers(requests);

  it('are asked of twelve primitive models', () => {
    expect(CASES.length).toBe(24);
    expect(CASES.filter(({ structure }) => structure.fixedPoints?.primitive).length).toBe(24);
  });

  describe.each(CASES)('$name', ({ structure, rho, observable, joint, requests: own }) => {
    const answer = (key: string): Answer => answers()[requests.indexOf(own[key] as object)] as Answer;

    it.each(MEAN_NAMES)('κ(ρ), ‖A‖² and q(A), %s mean', (mean) => {
      const model = metricOf(structure);
      const kappa = answer(`kappa ${mean}`);
      // Observables need not be self-adjoint for means that are not symmetric.
      const expected = numberOf(kappa.complexValue ?? kappa.value);
      const found = gradientEstimateAt({ model, mean, covariant: false }, rho);
      expectRelative(found.value, expected, 'κ');
      const { values, vectors } = blockEigen(structure.algebra, rho);
      const { metric, curvature } = quotientAt(model, operatorMean(mean), { lambda: values, u: vectors }, observable);
      const { norm, q } = answer(`quotient ${mean}`).value as { norm: number; q: number };
      expectRelative(metric, norm, '‖A‖²');
      expectRelative(curvature, q, 'q');
    });

    it('mlsi and lsi quotients, with an ancilla too, and cbe', () => {
      expectRelative(mlsiAt(structure, rho).value, numberOf(answer('mlsi').value), 'I/2D');
      expectRelative(mlsiAt(structure, joint, ANCILLA).value, numberOf(answer('mlsi with an ancilla').value), 'I/2D on M ⊗ M_2'); // prettier-ignore
      expectRelative(entropyProduction(structure, rho), numberOf(answer('entropy').production), 'I');
      expectRelative(lsiAt(structure, rho).value, numberOf(answer('lsi').value), '2E/D');
      const complete = completeBakryEmery(carreDuChamp(structure.generator));
      expect(complete.decided).toBe(true);
      const cbe = numberOf(answer('cbe').value);
      if (Number.isFinite(cbe)) expectRelative(complete.value, cbe, 'cbe');
      else expect(complete.value).toBe(cbe);
    });
  });
});

function requestsFor(
  model: object,
  { rho, observable, joint }: { rho: ComplexMatrix; observable: ComplexMatrix; joint: ComplexMatrix },
): Record<string, object> {
  const state = writeMatrix(rho);
  const atMean = (mean: MeanName): [string, object][] => [
    [`kappa ${mean}`, { what: 'kappa', model, state, mean }],
    [`quotient ${mean}`, { what: 'norm_and_q', model, state, observable: writeMatrix(observable), mean }],
  ];
  return {
    ...Object.fromEntries(MEAN_NAMES.flatMap(atMean)),
    mlsi: { what: 'mlsi_ratio', model, state },
    'mlsi with an ancilla': { what: 'mlsi_ratio', model, state: writeMatrix(joint), amplification: ANCILLA },
    entropy: { what: 'entropy', model, state },
    lsi: { what: 'lsi_ratio', model, state },
    cbe: { what: 'cbe', model },
  };
}

function expectRelative(actual: number, expected: number, what: string): void {
  expectClose(actual, expected, TOLERANCE * Math.max(1, Math.abs(expected)), what);
}
