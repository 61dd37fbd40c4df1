import { describe, expect, it } from 'vitest';
import { applyGenerator, frobeniusNorm, generatorMatrix, identity } from '@thalweg/core';
import { buildGenerator } from '../../src/model/build-generator.js';
import { loadModel } from '../../src/model/load-model.js';
import type { ModelDocument } from '../../src/model/model-document.js';
import { resolveModel } from '../../src/model/resolve-model.js';
import { refusal } from '../support/caught-error.js';
import { EVERY_FORM } from '../support/every-form.js';

const build = (document: ModelDocument) => buildGenerator(resolveModel(document));
const model = (
  generator: ModelDocument['generator'],
  more: Partial<ModelDocument> = { algebra: [2] },
): ModelDocument => ({
  schema: 'thalweg.model/1',
  ...more,
  generator,
});
const X = { pauli: 'X' };
const Z = { pauli: 'Z' };
const dephasing: ModelDocument['generator'] = { form: 'lindblad', jumps: [{ rate: 0.5, matrix: Z }] };

/** Largest difference between two generator matrices. */
function distance(a: Float64Array, b: Float64Array): number {
  expect(a.length).toBe(b.length);
  return a.reduce((worst, x, k) => Math.max(worst, Math.abs(x - (b[k] ?? NaN))), 0);
}

describe('buildGenerator', () => {
  it.each(Object.entries(EVERY_FORM))('builds the form %s, unital on its algebra', (_form, document) => {
    const generator = build(document);
    const one = identity(generator.algebra.size);
    expect(frobeniusNorm(applyGenerator(generator, one))).toBeLessThan(1e-12);
    expect(
      frobeniusNorm({
        ...one,
        re: generatorMatrix(generator),
        im: new Float64Array(generatorMatrix(generator).length),
      }),
    ).toBeGreaterThan(0.1);
    if (document.algebra) expect(generator.algebra.blocks).toEqual(document.algebra);
  });

  it('gives the same dephasing qubit in seven forms', () => {
    const same: ModelDocument['generator'][] = [
      { form: 'expectation', onto: { diagonal: true } },
      { form: 'expectation', onto: { blocks: [1, 1] }, rate: 1 },
      { form: 'expectation', onto: { spannedBy: [{ pauli: 'I' }, Z] } },
      { form: 'schur', points: [[0], [1]] },
      { form: 'balanced', state: { pauli: { I: 0.5 } }, terms: [{ matrix: { pauli: { Z: 0.5 } }, frequency: 0 }] },
      {
        form: 'superoperator',
        matrix: {
          shape: [4, 4],
          entries: [
            [1, 1, -1, 0],
            [2, 2, -1, 0],
          ],
        },
        picture: 'heisenberg',
        stacking: 'rows',
      },
      {
        form: 'sum',
        terms: [
          { weight: 0.25, generator: dephasing },
          { weight: 0.75, generator: dephasing },
        ],
      },
    ];
    const expected = generatorMatrix(build(model(dephasing)));
    for (const generator of same) {
      expect([generator.form, distance(generatorMatrix(build(model(generator))), expected) < 1e-14]).toEqual([
        generator.form,
        true,
      ]);
    }
  });

  it('takes an ohmic spectrum without cutoff as one with none', () => {
    const davies = (cutoff: number) =>
      build(
        model({
          form: 'davies',
          hamiltonian: Z,
          couplings: [X],
          beta: 0.5,
          spectrum: { kind: 'ohmic', strength: 1, cutoff },
        }),
      );
    const without = build(EVERY_FORM['davies, ohmic without cutoff'] ?? model(dephasing));
    expect(distance(generatorMatrix(without), generatorMatrix(davies(1e12)))).toBeLessThan(1e-9);
    expect(distance(generatorMatrix(without), generatorMatrix(davies(5)))).toBeGreaterThan(0.1);
  });

  it('declares the state of the document', () => {
    expect(build(model(dephasing)).declaredState).toBeNull();
    const declared = build(model(dephasing, { algebra: [2], state: { pauli: { I: 0.5 } } })).declaredState;
    expect(declared?.re).toEqual(Float64Array.of(0.5, 0, 0, 0.5));
  });

  it('finds the blocks of a group algebra and of a product', () => {
    expect(build(EVERY_FORM['length, dihedral'] as ModelDocument).algebra.blocks).toEqual([1, 1, 2]);
    expect(build(EVERY_FORM['tensor'] as ModelDocument).algebra.blocks).toEqual([4]);
  });

  it.each<[name: string, document: ModelDocument, code: string, pointer: string]>([
    [
      'a jump of the wrong size',
      model({ form: 'lindblad', jumps: [{ matrix: [[1]] }] }),
      'dimension-mismatch',
      '/generator/jumps/0/matrix',
    ],
    [
      'a negative rate',
      model({ form: 'lindblad', jumps: [{ rate: -1, matrix: X }] }),
      'negative-rate',
      '/generator/jumps/0/rate',
    ],
    [
      'a Hamiltonian that is not Hermitian',
      model({
        form: 'lindblad',
        hamiltonian: [
          [0, 1],
          [0, 0],
        ],
        jumps: [],
      }),
      'not-hermitian',
      '/generator/hamiltonian',
    ],
    [
      'a negative rate in a sum',
      model({ form: 'sum', terms: [{ weight: 1, generator: { form: 'lindblad', jumps: [{ rate: -1, matrix: X }] } }] }),
      'negative-rate',
      '/generator/terms/0/generator/jumps/0/rate',
    ],
    [
      'points that do not fit the algebra, in a sum',
      model({ form: 'sum', terms: [{ weight: 1, generator: { form: 'schur', points: [[0]] } }] }),
      'dimension-mismatch',
      '/algebra',
    ],
    [
      'a negative weight',
      model({ form: 'sum', terms: [{ weight: -1, generator: dephasing }] }),
      'negative-rate',
      '/generator/terms/0/weight',
    ],
    [
      'a broken factor',
      model(
        {
          form: 'tensor',
          factors: [
            {
              generator: {
                form: 'rates',
                rates: [
                  [0, -1],
                  [1, 0],
                ],
              },
            },
          ],
        },
        {},
      ),
      'negative-rate',
      '/generator/factors/0/generator/rates/0/1',
    ],
    [
      'a broken factor in a sum in a factor',
      model(
        {
          form: 'tensor',
          factors: [
            model({ form: 'sum', terms: [{ weight: 1, generator: { form: 'lindblad', jumps: [{ matrix: [[1]] }] } }] }),
          ],
        },
        {},
      ),
      'dimension-mismatch',
      '/generator/factors/0/generator/terms/0/generator/jumps/0/matrix',
    ],
    [
      'a factor whose algebra contradicts it',
      model(
        {
          form: 'tensor',
          factors: [
            {
              algebra: [3],
              generator: {
                form: 'rates',
                rates: [
                  [0, 1],
                  [1, 0],
                ],
              },
            },
          ],
        },
        {},
      ),
      'dimension-mismatch',
      '/generator/factors/0/algebra',
    ],
    [
      'a table that violates detailed balance',
      model({
        form: 'davies',
        hamiltonian: Z,
        couplings: [X],
        beta: 1,
        spectrum: {
          kind: 'table',
          values: [
            [2, 1],
            [-2, 1],
          ],
        },
      }),
      'spectrum-not-balanced',
      '/generator/spectrum/values/0',
    ],
    ['a state of trace two', model(dephasing, { algebra: [2], state: { pauli: 'I' } }), 'state-not-positive', '/state'],
  ])('refuses %s', (_name, document, code, pointer) => {
    const [gotCode, gotPointer, message] = refusal(() => build(document));
    expect([gotCode, gotPointer]).toEqual([code, pointer]);
    expect(message).toMatch(/^expected .*, got /);
  });

  it('refuses an algebra that contradicts the generator', () => {
    const chain = model(
      {
        form: 'rates',
        rates: [
          [0, 1],
          [1, 0],
        ],
      },
      { algebra: [2] },
    );
    expect(refusal(() => build(chain))).toEqual([
      'dimension-mismatch',
      '/algebra',
      'expected the blocks [1, 1] of this generator, got [2]; correct "algebra" or leave it out',
    ]);
  });
});

describe('loadModel', () => {
  it('goes from text, bytes or a value to the generator', () => {
    const document = model(dephasing);
    const text = JSON.stringify(document);
    const fromText = loadModel(text);
    expect(fromText.document).toStrictEqual(document);
    expect(fromText.digest).toMatch(/^[0-9a-f]{64}$/);
    for (const source of [new TextEncoder().encode(text), document]) {
      const other = loadModel(source);
      expect(other.digest).toBe(fromText.digest);
      expect(generatorMatrix(other.generator)).toEqual(generatorMatrix(fromText.generator));
    }
  });
});
