import {
  gradientEstimateAt,
  hasGradientMetric,
  isUnitarilyCovariant,
  lsiAt,
  metricOf,
  mlsiAt,
  provedWitness,
  ThalwegError,
  verifyWitness,
  type ComplexMatrix,
  type ConstantId,
  type MeanName,
  type Structure,
  type Witness,
} from '@thalweg/core';
import { decodeWitness, encodeWitness, type VerdictDocument, type WitnessDocument } from '@thalweg/format';
import { inDocument } from '../../input/in-document.js';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import { markovModel } from './model-cache.js';
import { readState } from './read-state.js';

/** The witness at a given state: for `ge` the best observable there, for entropy constants the state alone. */
export function witnessAtState({
  source,
  state,
  constant,
  mean,
}: {
  readonly source: DocumentSource;
  readonly state: DocumentSource;
  readonly constant: ConstantId;
  readonly mean: MeanName;
}): WitnessDocument {
  const { structure, digest } = markovModel(source);
  const witness = witnessOf(structure, readState(structure, state), constant, mean);
  return encodeWitness(provedWitness(structure, witness), digest, TOOL);
}

/** The document of a witness that a search found, stating what can be proved of it. */
export function witnessDocument({
  source,
  witness,
}: {
  readonly source: DocumentSource;
  readonly witness: Witness;
}): WitnessDocument {
  const { structure, digest } = markovModel(source);
  return encodeWitness(provedWitness(structure, witness), digest, TOOL);
}

function witnessOf(structure: Structure, rho: ComplexMatrix, constant: ConstantId, mean: MeanName): Witness {
  switch (constant) {
    case 'ge': {
      requireMetric(structure);
      const covariant = isUnitarilyCovariant(structure.generator);
      const { value, observable } = gradientEstimateAt({ model: metricOf(structure), mean, covariant }, rho);
      return { constant, mean, value, state: rho, observable, amplification: 1 };
    }
    case 'mlsi':
      return { constant, value: mlsiAt(structure, rho).value, state: rho, observable: null, amplification: 1 };
    case 'lsi':
      return { constant, value: lsiAt(structure, rho).value, state: rho, observable: null, amplification: 1 };
    default:
      throw new ThalwegError('usage', `expected ge, mlsi or lsi for a witness at a given state, got ${constant}`);
  }
}

function requireMetric(structure: Structure): void {
  if (hasGradientMetric(structure)) return;
  throw new ThalwegError(
    'not-symmetric',
    'expected a GNS-symmetric generator for ge, got one that is not; gap, be, cbe, mlsi and lsi are still given by thalweg constants',
  );
}

/** Evaluate a witness afresh on its model and compare with the value it states. */
export function checkWitness({
  source,
  document,
  name,
}: {
  readonly source: DocumentSource;
  readonly document: WitnessDocument;
  /** Of the witness, for messages. */
  readonly name: string;
}): VerdictDocument {
  const { structure, digest } = markovModel(source);
  if (document.model !== digest) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected the model with digest ${document.model}, got ${digest}; the witness belongs to another model: name that one with --model`,
      { pointer: '/model', details: { document: name } },
    );
  }
  const { holds, value, margin, error, grade, upper } = inDocument(name, () =>
    verifyWitness(structure, decodeWitness(document)),
  );
  const { constant, mean } = document;
  return {
    schema: 'thalweg.verdict/1',
    verb: 'verify',
    model: digest,
    claims: [
      {
        constant,
        ...(mean === undefined ? {} : { mean }),
        relation: 'at-most',
        value: document.value,
        verdict: holds ? 'holds' : 'refuted',
        bracket: {
          lower: null,
          upper: { value: upper, grade, by: 'witness evaluated afresh', margin: Math.abs(upper - value) },
        },
        ...(holds ? {} : { note: `the witness gives ${value}, not ${document.value}` }),
      },
    ],
    checks: [
      grade === 'enclosed'
        ? { name: 'upper end of the enclosure', holds, value: upper, bound: document.value }
        : { name: 'value of the witness', holds, value: error, bound: margin },
    ],
    tool: TOOL,
  };
}
