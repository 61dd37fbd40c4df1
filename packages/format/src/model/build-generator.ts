import {
  balancedGenerator,
  blockAlgebra,
  daviesGenerator,
  expectationGenerator,
  lengthGenerator,
  lindbladGenerator,
  memoryText,
  ratesGenerator,
  sameAlgebra,
  schurGenerator,
  sumGenerator,
  superoperatorGenerator,
  tensorGenerator,
  ThalwegError,
  withDeclaredState,
  type BathSpectrum,
  type BlockAlgebra,
  type Generator,
} from '@thalweg/core';
import { MATRIX_LIMITS } from '../limits.js';
import type { DecodedMatrix } from '../matrix/decode-matrix.js';
import type { GeneratorForm, Model, SpectrumDocument } from './model-document.js';
import { withBasePointer } from './with-base-pointer.js';

/**
 * The generator that a model with decoded matrices describes, its declared state included. Whether it is a Markov semigroup, and
 * for what state it is symmetric, is not asked here. Throws the errors of the constructors in @thalweg/core with the pointer of
 * the offending place in this document, and `dimension-mismatch` where `algebra` contradicts the generator.
 */
export function buildGenerator(model: Model<DecodedMatrix>): Generator {
  if (model.algebra) requireSide(sum(model.algebra), '/algebra', 'levels in all blocks together');
  const declared = model.algebra && blockAlgebra(model.algebra);
  const generator = fromForm(model.generator, declared);
  requireDeclared(generator.algebra, declared);
  return model.state ? withDeclaredState(generator, model.state) : generator;
}

function fromForm(form: GeneratorForm<DecodedMatrix>, declared: BlockAlgebra | undefined): Generator {
  const given = declared && { algebra: declared };
  switch (form.form) {
    case 'rates':
      return ratesGenerator(form.rates);
    case 'length':
      return lengthGenerator({ group: form.group, length: form.length, ...given });
    case 'schur':
      requireSide(form.points.length, '/generator/points', 'points');
      return schurGenerator({ points: form.points, ...given });
    case 'sum':
      return sumGenerator(
        form.terms.map(({ weight, generator }, k) => ({
          weight,
          generator: withBasePointer(`/generator/terms/${k}`, () => fromForm(generator, declared), ['/algebra']),
        })),
      );
    case 'tensor':
      return tensorGenerator(
        form.factors.map((factor, k) => withBasePointer(`/generator/factors/${k}`, () => buildGenerator(factor))),
      );
    default:
      return onAlgebra(form, requireAlgebra(declared));
  }
}

type FormOnAlgebra = Exclude<GeneratorForm<DecodedMatrix>, { form: 'rates' | 'length' | 'schur' | 'sum' | 'tensor' }>;

function onAlgebra(form: FormOnAlgebra, algebra: BlockAlgebra): Generator {
  switch (form.form) {
    case 'lindblad':
      return lindbladGenerator({ ...form, algebra });
    case 'balanced':
      return balancedGenerator({ ...form, algebra });
    case 'expectation':
      return expectationGenerator({ ...form, algebra });
    case 'davies':
      return daviesGenerator({ ...form, algebra, spectrum: withCutoff(form.spectrum) });
    case 'superoperator':
      return superoperatorGenerator({ ...form, algebra });
  }
}

/** e^{−|w|/cutoff} is exactly 1 at the largest double. */
function withCutoff(spectrum: SpectrumDocument): BathSpectrum {
  return spectrum.kind === 'ohmic' ? { ...spectrum, cutoff: spectrum.cutoff ?? Number.MAX_VALUE } : spectrum;
}

/** The schema asks for the algebra at the top; only a caller that went around it gets here without one. */
function requireAlgebra(declared: BlockAlgebra | undefined): BlockAlgebra {
  if (declared) return declared;
  throw new ThalwegError(
    'wrong-schema',
    'expected "algebra", the block sizes, got nothing; write for example [2] for a qubit',
    {
      pointer: '/algebra',
    },
  );
}

/** Elements are held in N×N matrices: refused before any is allocated. */
function requireSide(size: number, pointer: string, what: string): void {
  const { side } = MATRIX_LIMITS;
  if (size <= side) return;
  throw new ThalwegError(
    'too-large',
    `expected at most ${side} ${what}, got ${size}: one complex matrix would take ${memoryText(BYTES_PER_ENTRY * size * size)}; reduce the model`,
    { pointer, details: { limit: side, size } },
  );
}

const BYTES_PER_ENTRY = 16;

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

function requireDeclared(found: BlockAlgebra, declared: BlockAlgebra | undefined): void {
  if (!declared || sameAlgebra(found, declared)) return;
  const message = `expected the blocks [${found.blocks.join(', ')}] of this generator, got [${declared.blocks.join(', ')}]; correct "algebra" or leave it out`;
  throw new ThalwegError('dimension-mismatch', message, { pointer: '/algebra' });
}
