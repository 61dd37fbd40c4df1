import {
  type ComplexMatrix,
  analyse,
  applyGenerator,
  applyGeneratorAdjoint,
  eigenvaluesGeneral,
  expmAction,
  expmReal,
  frobeniusNorm,
  fromCoordinates,
  fromRows,
  generatorMatrix,
  generatorNormBound,
  realTimesVector,
  subtract,
  toCoordinates,
} from '@thalweg/core';
import { describe, expect, it } from 'vitest';
import {
  type Answer,
  type WrittenMatrix,
  referenceAnswers,
  writeMatrix,
} from '../../packages/core/test/helpers/ask-reference.js';
import { expectBelow } from '../../packages/core/test/linalg/support/expect-close.js';
import { randomHermitian, randomState } from './support/random-forms.js';
import { type RandomModel, randomModels } from './support/random-models.js';

const TOLERANCE = 1e-10;
const TIMES = [0.05, 0.6, 4];

const CASES = randomModels().map((model) => {
  const { algebra } = model.generator;
  return { ...model, observable: randomHermitian(model.random, algebra), rho: randomState(model.random, algebra) };
});

/** What is asked about one model, and what came back. */
interface Answers {
  readonly image: Answer;
  readonly flow: Answer;
  readonly spectrum: Answer;
  readonly state: Answer;
  readonly symmetry: Answer;
  readonly evolved: readonly { readonly t: number; readonly observable: Answer; readonly state: Answer }[];
}

describe('twenty random generators against SciPy', () => {
  const answers = referenceAnswers(CASES.flatMap(requestsFor));

  it('are twenty, of seven forms', () => {
    expect(new Set(CASES.map(({ name }) => name)).size).toBe(20);
    expect(new Set(CASES.map(({ document }) => document.generator.form)).size).toBe(7);
  });

  describe.each(CASES)('$name', ({ name, generator, observable, rho, symmetric }) => {
    const { algebra } = generator;
    const reference = (): Answers => {
      const each = answers().length / CASES.length;
      const index = CASES.findIndex((one) => one.name === name);
      return named(answers().slice(index * each, (index + 1) * each));
    };

    it('L, L† and their exponentials', () => {
      const { image, flow, evolved } = reference();
      expectSameMatrix(applyGenerator(generator, observable), image, 'L(A)');
      expectSameMatrix(applyGeneratorAdjoint(generator, rho), flow, 'L†(ρ)');
      expect(evolved.length).toBe(TIMES.length);
      for (const { t, observable: a, state } of evolved) {
        expectSameMatrix(
          evolve(t, observable, (x) => applyGenerator(generator, x)),
          a,
          `P_t A, t = ${t}`,
        );
        expectSameMatrix(
          evolve(t, rho, (x) => applyGeneratorAdjoint(generator, x)),
          state,
          `P_t†ρ, t = ${t}`,
        );
        const e = expmReal(
          generatorMatrix(generator).map((x) => t * x),
          algebra.dimension,
        );
        const x = realTimesVector(e, algebra.dimension, algebra.dimension, toCoordinates(algebra, observable));
        expectSameMatrix(fromCoordinates(algebra, x), a, `P_t A by the matrix, t = ${t}`);
      }
    });

    it('spectrum', () => {
      const { re, im } = eigenvaluesGeneral(generatorMatrix(generator), algebra.dimension);
      const expected = reference().spectrum.value as { re: number[]; im: number[] };
      expectSameSpectrum({ re: re.map((x) => -x), im: im.map((y) => -y) }, expected);
    });

    it('reference state, fixed points, symmetry', () => {
      const { state, symmetry } = reference();
      const structure = analyse(generator);
      expectSameMatrix(structure.state?.sigma as ComplexMatrix, state, 'reference state');
      expect(structure.fixedPoints?.dimension).toBe(state.fixedPoints);
      const expected = symmetry.value as Record<string, number>;
      const found = structure.symmetry;
      for (const kind of ['tracial', 'gns', 'kms'] as const) {
        expectBelow(Math.abs(found.residuals[kind] - (expected[kind] ?? NaN)), TOLERANCE, `${kind} residual`);
      }
      const flat = (expected.state_from_trace ?? NaN) < TOLERANCE;
      const holds = (kind: string): boolean => (expected[kind] ?? NaN) < TOLERANCE;
      const kind = flat && holds('tracial') ? 'tracial' : holds('gns') ? 'GNS' : holds('kms') ? 'KMS' : 'none';
      expect(found.kind).toBe(kind);
      expect(kind === 'tracial' || kind === 'GNS').toBe(symmetric);
    });

    function evolve(t: number, a: ComplexMatrix, apply: (a: ComplexMatrix) => ComplexMatrix): ComplexMatrix {
      const step = (x: Float64Array): Float64Array => toCoordinates(algebra, apply(fromCoordinates(algebra, x)));
      return fromCoordinates(algebra, expmAction(step, t, toCoordinates(algebra, a), generatorNormBound(generator)));
    }
  });
});

function requestsFor({
  document: model,
  observable,
  rho,
}: RandomModel & { observable: ComplexMatrix; rho: ComplexMatrix }): object[] {
  const given = { observable: writeMatrix(observable), state: writeMatrix(rho) };
  return [
    { what: 'generator', model, observable: given.observable },
    { what: 'adjoint', model, state: given.state },
    { what: 'spectrum', model },
    { what: 'state', model },
    { what: 'symmetry', model },
    ...TIMES.flatMap((t) => [
      { what: 'expm', model, t, observable: given.observable },
      { what: 'expm_state', model, t, state: given.state },
    ]),
  ];
}

function named(list: readonly Answer[]): Answers {
  const [image, flow, spectrum, state, symmetry, ...moved] = list as [
    Answer,
    Answer,
    Answer,
    Answer,
    Answer,
    ...Answer[],
  ];
  const evolved = TIMES.map((t, k) => ({ t, observable: moved[2 * k] as Answer, state: moved[2 * k + 1] as Answer }));
  return { image, flow, spectrum, state, symmetry, evolved };
}

function expectSameMatrix(actual: ComplexMatrix, answer: Answer, what: string): void {
  const { re, im } = answer.value as WrittenMatrix;
  const expected = fromRows(re, im);
  const scale = Math.max(1, frobeniusNorm(expected));
  expectBelow(frobeniusNorm(subtract(actual, expected)) / scale, TOLERANCE, what);
}

interface Spectrum {
  readonly re: ArrayLike<number>;
  readonly im: ArrayLike<number>;
}

/** Every eigenvalue has its own partner in the other list, the nearest one first. */
function expectSameSpectrum(actual: Spectrum, expected: Spectrum): void {
  const left = Array.from(expected.re, (re, k) => ({ re, im: expected.im[k] ?? NaN }));
  expect(actual.re.length).toBe(left.length);
  const scale = Math.max(1, ...left.map(({ re, im }) => Math.hypot(re, im)));
  for (let k = 0; k < actual.re.length; k++) {
    const distances = left.map(({ re, im }) => Math.hypot(re - (actual.re[k] ?? NaN), im - (actual.im[k] ?? NaN)));
    const nearest = distances.indexOf(Math.min(...distances));
    expectBelow((distances[nearest] ?? NaN) / scale, TOLERANCE, `distance of eigenvalue ${k}`);
    left.splice(nearest, 1);
  }
}
