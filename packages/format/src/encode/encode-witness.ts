import type { Witness } from '@thalweg/core';
import { decodeMatrix, toDense, type DecodeOptions } from '../matrix/decode-matrix.js';
import { encodeMatrix } from '../matrix/encode-matrix.js';
import type { WitnessDocument } from '../schema/witness-schema.js';

type Evidence = Omit<WitnessDocument, 'schema' | 'model' | 'tool'>;

/** A witness as a document of its own, for the model of the given digest. */
export function encodeWitness(witness: Witness, model: string, tool?: WitnessDocument['tool']): WitnessDocument {
  return { schema: 'thalweg.witness/1', model, ...encodeEvidence(witness), ...(tool && { tool }) };
}

/** A witness as an end of a bracket carries it. */
export function encodeEvidence({ constant, mean, value, state, observable, amplification }: Witness): Evidence {
  return {
    constant,
    ...(mean !== undefined && { mean }),
    value,
    state: encodeMatrix(state),
    observable: observable && encodeMatrix(observable),
    amplification,
  };
}

/** The witness of a document, its matrices decoded; throws the errors of `decodeMatrix`. */
export function decodeWitness(document: Evidence, options: DecodeOptions = {}): Witness {
  const { constant, mean, value, amplification } = document;
  const { pointer = '' } = options;
  const dense = (field: 'state' | 'observable', matrix: Evidence['state']) =>
    toDense(decodeMatrix(matrix, { ...options, pointer: `${pointer}/${field}` }), options.limits);
  return {
    constant,
    ...(mean !== undefined && { mean }),
    value,
    state: dense('state', document.state),
    observable: document.observable && dense('observable', document.observable),
    amplification,
  };
}
