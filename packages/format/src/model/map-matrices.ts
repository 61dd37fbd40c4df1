import type { ExpectationForm, GeneratorForm, Model } from './model-document.js';

/** What to put in place of a matrix; `pointer` is its JSON pointer in the document. */
export type MatrixMap<A, B> = (matrix: A, pointer: string) => B;

/** The same model with every matrix replaced, in document order. */
export function mapMatrices<A, B>(model: Model<A>, map: MatrixMap<A, B>, pointer = ''): Model<B> {
  const { generator, state, ...rest } = model;
  return {
    ...rest,
    generator: mapGenerator(generator, map, `${pointer}/generator`),
    ...(state !== undefined && { state: map(state, `${pointer}/state`) }),
  };
}

function mapGenerator<A, B>(generator: GeneratorForm<A>, map: MatrixMap<A, B>, at: string): GeneratorForm<B> {
  switch (generator.form) {
    case 'rates':
    case 'length':
    case 'schur':
      return generator;
    case 'lindblad': {
      const { hamiltonian, jumps } = generator;
      return {
        form: 'lindblad',
        ...(hamiltonian !== undefined && { hamiltonian: map(hamiltonian, `${at}/hamiltonian`) }),
        jumps: mapItems(jumps, map, `${at}/jumps`),
      };
    }
    case 'balanced':
      return {
        ...generator,
        state: map(generator.state, `${at}/state`),
        terms: mapItems(generator.terms, map, `${at}/terms`),
      };
    case 'expectation':
      return { ...generator, onto: mapTarget(generator.onto, map, `${at}/onto/spannedBy`) };
    case 'davies':
      return {
        ...generator,
        hamiltonian: map(generator.hamiltonian, `${at}/hamiltonian`),
        couplings: generator.couplings.map((matrix, k) => map(matrix, `${at}/couplings/${k}`)),
      };
    case 'superoperator':
      return { ...generator, matrix: map(generator.matrix, `${at}/matrix`) };
    case 'sum':
      return {
        form: 'sum',
        terms: generator.terms.map(({ weight, generator: term }, k) => ({
          weight,
          generator: mapGenerator(term, map, `${at}/terms/${k}/generator`),
        })),
      };
    case 'tensor':
      return {
        form: 'tensor',
        factors: generator.factors.map((factor, k) => mapMatrices(factor, map, `${at}/factors/${k}`)),
      };
  }
}

function mapItems<A, B, T extends { matrix: A }>(items: T[], map: MatrixMap<A, B>, at: string) {
  return items.map(({ matrix, ...rest }, k) => ({ ...rest, matrix: map(matrix, `${at}/${k}/matrix`) }));
}

function mapTarget<A, B>(
  onto: ExpectationForm<A>['onto'],
  map: MatrixMap<A, B>,
  at: string,
): ExpectationForm<B>['onto'] {
  return 'spannedBy' in onto ? { spannedBy: onto.spannedBy.map((matrix, k) => map(matrix, `${at}/${k}`)) } : onto;
}
