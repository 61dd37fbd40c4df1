import { analyse, isMarkov, ThalwegError, type Structure } from '@thalweg/core';
import { loadModel, type LoadedModel, type ModelDocument } from '@thalweg/format';
import { createNodeSha256 } from '@thalweg/format/node';
import { filesBesideSource } from '../../input/files-beside.js';
import { inDocument } from '../../input/in-document.js';
import type { DocumentSource } from '../../input/read-source.js';
import { requireMemory } from './require-memory.js';

/** A model read and analysed, as every task starts from it. */
export interface AnalysedModel {
  readonly document: ModelDocument;
  readonly digest: string;
  readonly structure: Structure;
}

let last: { readonly key: string; readonly model: AnalysedModel } | null = null;

/** The analysed model of a source; a thread keeps the last one, since the tasks of one command share it. */
export function analysedModel(source: DocumentSource): AnalysedModel {
  const key = `${source.folder}\n${Buffer.from(source.bytes).toString('latin1')}`;
  if (last?.key === key) return last.model;
  const { document, digest, generator } = readModel(source);
  const structure = inDocument(source.name, () => {
    requireMemory(generator.algebra);
    return analyse(generator);
  });
  const model = { document, digest, structure };
  last = { key, model };
  return model;
}

/** A model read, its generator built, nothing computed. */
export function readModel(source: DocumentSource): LoadedModel {
  return inDocument(source.name, () => {
    refuseOtherFiles(source);
    return loadModel(source.bytes, { ...filesBesideSource(source), createHash: createNodeSha256 });
  });
}

/** The analysed model, refused with its smallest eigenvalue or residual when it is no Markov semigroup. */
export function markovModel(source: DocumentSource): AnalysedModel {
  const model = analysedModel(source);
  const { markov } = model.structure;
  if (isMarkov(markov)) return model;
  throw new ThalwegError(
    'not-completely-positive',
    `expected a generator of a Markov semigroup, got one that is not: ${whyNot(markov)}; thalweg inspect tells more`,
    { details: { document: source.name } },
  );
}

function whyNot({ completelyPositive, unital, hermitian }: Structure['markov']): string {
  if (!hermitian.holds) return `it does not preserve Hermiticity, residual ${hermitian.residual.toPrecision(4)}`;
  if (!unital.holds) return `L(1) is not 0, residual ${unital.residual.toPrecision(4)}`;
  return `it is not completely positive, smallest eigenvalue ${completelyPositive.smallestEigenvalue.toPrecision(6)}`;
}

/** NumPy and Matrix Market files hold a matrix, not a model: say how to use one. */
function refuseOtherFiles({ bytes, name }: DocumentSource): void {
  const isNumpy = bytes[0] === 0x93 && Buffer.from(bytes.subarray(1, 6)).toString('latin1') === 'NUMPY';
  const isMatrixMarket = Buffer.from(bytes.subarray(0, 14)).toString('latin1') === '%%MatrixMarket';
  if (!isNumpy && !isMatrixMarket) return;
  throw new ThalwegError(
    'not-json',
    `expected a model document, got the ${isNumpy ? 'NumPy' : 'Matrix Market'} file ${name}, which holds one matrix; write {"schema":"thalweg.model/1","algebra":[2],"generator":{"form":"superoperator","picture":"heisenberg","stacking":"rows","matrix":{"file":"${name.split('/').pop()}"}}} beside it and name that`,
  );
}
