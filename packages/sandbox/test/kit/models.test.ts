import { analyse } from '@thalweg/core';
import { loadModel } from '@thalweg/format';
import { expect, test } from 'vitest';
import * as kit from '../../src/kit/names.js';
import type { Model } from '../../src/kit/model/models.js';

const [x, z] = [kit.pauli('X'), kit.pauli('Z')];
const qubit = kit.lindbladModel({ title: 'flips', jumps: [{ label: 'bit flip', rate: 0.5, matrix: x }, z] });

/** One of each form, with the dimension of its algebra. */
const models: [string, Model, number][] = [
  [
    'lindblad',
    kit.lindbladModel({
      hamiltonian: z,
      jumps: [
        x,
        {
          rate: 2,
          matrix: [
            [0, 1],
            [0, 0],
          ],
        },
      ],
    }),
    4,
  ],
  ['balanced', thermal(1), 4],
  ['rates', kit.ratesModel(kit.cycleGraph(5), { title: 'cycle' }), 5],
  ['expectation', kit.expectationModel({ algebra: [3], onto: 'scalars', rate: 2 }), 9],
  ['expectation', kit.expectationModel({ algebra: [2], onto: { spannedBy: [kit.identity(2), z] } }), 4],
  ['length', kit.lengthModel(kit.symmetricGroup(3), 'word'), 6],
  ['schur', kit.schurModel([[0], [1], [3]]), 9],
  ['davies', kit.daviesModel({ hamiltonian: z, couplings: [x], beta: 1, spectrum: { kind: 'flat', strength: 1 } }), 4],
  ['superoperator', kit.superoperatorModel({ algebra: [2], matrix: flipSuperoperator() }), 4],
  ['sum', kit.sumModel({ terms: [{ model: qubit }, { weight: 2, model: qubit }] }), 4],
  ['tensor', kit.tensorModel([qubit, kit.ratesModel(kit.pathGraph(2))]), 8],
];

test.each(models)('a model of the form %s is a document that loads', (form, model, dimension) => {
  const text = JSON.stringify(model);
  const { generator } = loadModel(text);
  expect(JSON.parse(text).generator.form).toBe(form);
  expect(generator.algebra.dimension).toBe(dimension);
  expect(analyse(generator).markov.unital.holds).toBe(true);
});

function thermal(beta: number): Model {
  return kit.balancedModel({
    state: kit.gibbsState([0, 1], beta),
    terms: [
      { label: 'down', matrix: kit.matrixUnit(2, 0, 1), frequency: -beta },
      { label: 'up', matrix: kit.matrixUnit(2, 1, 0), frequency: beta },
    ],
  });
}

/** A ↦ XAX − A on stacked rows: X ⊗ Xᵀ − 1. */
function flipSuperoperator() {
  return kit.subtract(kit.kron(x, kit.transpose(x)), kit.identity(4));
}
