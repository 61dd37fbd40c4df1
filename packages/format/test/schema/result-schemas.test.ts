import { describe, expect, it } from 'vitest';
import { encodeBracket, encodeEnd } from '../../src/encode/encode-end.js';
import { decodeWitness, encodeWitness } from '../../src/encode/encode-witness.js';
import { decodeMatrix, toDense } from '../../src/matrix/decode-matrix.js';
import {
  parseDocument,
  parseReport,
  parseSheet,
  parseState,
  parseVerdict,
  parseWitness,
} from '../../src/schema/parse-document.js';
import { refusal } from '../support/caught-error.js';

const DIGEST = '0123456789abcdef'.repeat(4);
const TOOL = { name: 'thalweg', version: '0.1.0' };
const lower = { value: 1, grade: 'certified', by: 'eigenvalue problem', margin: 1e-12 };
const upper = { value: 1, grade: 'observed', by: 'search' };
const MODEL = { title: 'Qubit', digest: DIGEST, dimension: 4, blocks: [2], symmetry: 'gns', primitive: true };
const sheet = {
  schema: 'thalweg.sheet/1',
  model: MODEL,
  convention: 'two-alpha',
  constants: [
    { id: 'gap', lower, upper: null, closed: false, definition: 'λ' },
    { id: 'ge', mean: 'logarithmic', lower: null, upper, closed: false, definition: 'K', note: 'n' },
    { id: 'mixing', epsilon: 0.01, lower: null, upper: null, closed: false, definition: 't' },
  ],
  seed: 1,
  tool: TOOL,
};
const witness = {
  schema: 'thalweg.witness/1',
  model: DIGEST,
  constant: 'ge',
  mean: 'left',
  value: 0.5,
  state: [
    [0.5, 0],
    [0, 0.5],
  ],
  observable: {
    re: [
      [0, 0],
      [0, 0],
    ],
    im: [
      [0, -1],
      [1, 0],
    ],
  },
  amplification: 1,
};
const report = {
  schema: 'thalweg.report/1',
  model: { ...MODEL, primitive: null },
  markov: {
    hermitian: { holds: true, residual: 0 },
    unital: { holds: true, residual: 1e-17 },
    completelyPositive: { holds: false, smallestEigenvalue: -0.5, byForm: false },
  },
  symmetry: { kind: 'none', residuals: { tracial: 1, gns: 1, kms: 1 } },
  state: null,
  fixedPoints: { dimension: 2, blocks: [1, 1] },
  primitive: null,
  jumps: [{ label: 'V1', frequency: 0.5, norm: 1, matrix: { pauli: 'X' } }],
  canonicalResidual: 1e-15,
  spectrum: [0, 1, [1, -0.5]],
  notes: ['one'],
  tool: TOOL,
};
const verdict = {
  schema: 'thalweg.verdict/1',
  verb: 'check',
  model: DIGEST,
  convention: 'two-alpha',
  claims: [{ constant: 'gap', relation: 'at-least', value: 0.9, verdict: 'holds', bracket: { lower, upper: null } }],
  checks: [{ name: 'intertwining', holds: true, value: 1e-15, bound: 1e-9 }],
  seed: 'a seed',
  tool: TOOL,
};
const state = { schema: 'thalweg.state/1', matrix: [[1]] };

const text = JSON.stringify;

/** The sheet with the first constant changed. */
const withConstant = (change: object) => text({ ...sheet, constants: [{ ...sheet.constants[0], ...change }] });
const withLower = (change: object) => withConstant({ lower: { ...lower, ...change } });
const withUpper = (change: object) => withConstant({ upper: { ...upper, ...change } });

describe('the schemas of results', () => {
  it.each([
    ['sheet', sheet],
    ['witness', witness],
    ['report', report],
    ['verdict', verdict],
    ['state', state],
  ])('parseDocument tells a %s by its schema and changes nothing', (_name, document) => {
    expect(parseDocument(text(document))).toStrictEqual(document);
  });

  it('parse functions read their own documents', () => {
    expect(parseSheet(text(sheet))).toStrictEqual(sheet);
    expect(parseWitness(text(witness))).toStrictEqual(witness);
    expect(parseReport(text(report))).toStrictEqual(report);
    expect(parseVerdict(text(verdict))).toStrictEqual(verdict);
    expect(parseState(text(state))).toStrictEqual([[1]]);
    expect(parseState('{"pauli": "I"}')).toStrictEqual({ pauli: 'I' });
  });

  it('accepts an unbounded end with its note, and evidence of both kinds', () => {
    const unbounded = { value: null, grade: 'certified', by: 'unbounded', note: 'Γ₂ is not positive on ker Γ' };
    expect(parseSheet(withConstant({ id: 'cbe', lower: unbounded, upper: unbounded }))).toBeTruthy();
    const { constant, value, state: at, observable, amplification } = witness;
    expect(parseSheet(withUpper({ evidence: { constant, value, state: at, observable, amplification } }))).toBeTruthy();
    expect(parseSheet(withLower({ evidence: { certificate: DIGEST } }))).toBeTruthy();
  });

  const schemas =
    'thalweg.model/1, thalweg.sheet/1, thalweg.report/1, thalweg.witness/1, thalweg.certificate/1, thalweg.verdict/1, thalweg.comparison/1, thalweg.distance/1, thalweg.flow/1, thalweg.relief/1, thalweg.state/1, thalweg.example/1, thalweg.showcase/1, thalweg.sweep/1, thalweg.point/1, thalweg.reproduction/1';
  const cases: [name: string, run: () => unknown, code: string, pointer: string, message: string][] = [
    [
      'a document of an unknown schema',
      () => parseDocument('{"schema": "thalweg.map/1"}'),
      'wrong-schema',
      '/schema',
      `expected a document whose "schema" is one of ${schemas}, got the text "thalweg.map/1"; correct it`,
    ],
    [
      'a schema named like an inherited property',
      () => parseDocument('{"schema": "toString"}'),
      'wrong-schema',
      '/schema',
      `expected a document whose "schema" is one of ${schemas}, got the text "toString"; correct it`,
    ],
    [
      'a document without schema',
      () => parseDocument('[[1]]'),
      'wrong-schema',
      '/schema',
      `expected a document whose "schema" is one of ${schemas}, got nothing; correct it`,
    ],
    [
      'a model as a sheet',
      () => parseSheet('{"schema": "thalweg.model/1", "generator": {}}'),
      'wrong-schema',
      '/schema',
      'expected "thalweg.sheet/1", got the text "thalweg.model/1"; correct /schema',
    ],
    [
      'an observed lower end',
      () => parseSheet(withLower({ grade: 'observed' })),
      'wrong-schema',
      '/constants/0/lower/grade',
      'expected a proved lower end (exact, enclosed or certified), got an observed one; a search proves no bound from below',
    ],
    [
      'an unknown grade',
      () => parseSheet(withLower({ grade: 'likely' })),
      'wrong-schema',
      '/constants/0/lower/grade',
      'expected one of "exact", "enclosed", "certified", "observed", got the text "likely"; correct /constants/0/lower/grade',
    ],
    [
      'null without a reason',
      () => parseSheet(withLower({ value: null })),
      'wrong-schema',
      '/constants/0/lower/by',
      'expected "by" to be "unbounded" where the value is null, got "eigenvalue problem"; give the value or the reason',
    ],
    [
      'an unbounded end without a note',
      () => parseSheet(withLower({ value: null, by: 'unbounded' })),
      'wrong-schema',
      '/constants/0/lower/note',
      'expected a note that says why the end is unbounded, got nothing; add the field "note"',
    ],
    [
      'an unbounded end with a value',
      () => parseSheet(withUpper({ by: 'unbounded' })),
      'wrong-schema',
      '/constants/0/upper/value',
      'expected null as the value of an unbounded end, got 1; correct "by" or the value',
    ],
    [
      'an infinite value as text',
      () => parseSheet(withLower({ value: '-inf' })),
      'wrong-schema',
      '/constants/0/lower/value',
      'expected a number, got the text "-inf"; correct /constants/0/lower/value',
    ],
    [
      'an unknown constant',
      () => parseSheet(withConstant({ id: 'ricci' })),
      'wrong-schema',
      '/constants/0/id',
      'expected one of "gap", "ge", "cge", "be", "cbe", "mlsi", "clsi", "lsi", "t2", "diameter", "mixing", got the text "ricci"; correct /constants/0/id',
    ],
    [
      'an unknown mean',
      () => parseSheet(withConstant({ mean: 'log' })),
      'wrong-schema',
      '/constants/0/mean',
      'expected one of "logarithmic", "arithmetic", "geometric", "harmonic", "left", "right", got the text "log"; correct /constants/0/mean',
    ],
    [
      'a gradient estimate without its mean',
      () => parseSheet(withConstant({ id: 'ge' })),
      'wrong-schema',
      '/constants/0/mean',
      'expected the operator mean of "ge", got nothing; add the field "mean", for example "logarithmic"',
    ],
    [
      'a mixing time without its distance',
      () => parseSheet(withConstant({ id: 'mixing' })),
      'wrong-schema',
      '/constants/0/epsilon',
      'expected the distance of "mixing", got nothing; add the field "epsilon"',
    ],
    [
      'a distance beside another constant',
      () => parseSheet(withConstant({ epsilon: 1 })),
      'wrong-schema',
      '/constants/0/epsilon',
      'expected no "epsilon" beside "gap", got 1; remove it',
    ],
    [
      'a digest in capitals',
      () => parseWitness(text({ ...witness, model: DIGEST.toUpperCase() })),
      'wrong-schema',
      '/model',
      `expected a SHA-256 digest of 64 digits 0-9a-f, got the text "${DIGEST.toUpperCase().slice(0, 40)}…"; correct /model`,
    ],
    [
      'an amplification of zero',
      () => parseWitness(text({ ...witness, amplification: 0 })),
      'wrong-schema',
      '/amplification',
      'expected a whole number of at least 1, got 0; correct /amplification',
    ],
    [
      'a witness without observable',
      () => parseWitness(text({ ...witness, observable: undefined })),
      'wrong-schema',
      '/observable',
      'expected a matrix: rows of numbers, {"re", "im"}, {"shape", "entries"}, {"pauli"} or {"file"}, got nothing; add the field "observable"',
    ],
    [
      'an unknown verdict',
      () => parseVerdict(text({ ...verdict, claims: [{ ...verdict.claims[0], verdict: 'true' }] })),
      'wrong-schema',
      '/claims/0/verdict',
      'expected one of "holds", "refuted", "undecided", got the text "true"; correct /claims/0/verdict',
    ],
    [
      'evidence of no kind',
      () => parseSheet(withUpper({ evidence: { proof: 1 } })),
      'wrong-schema',
      '/constants/0/upper/evidence',
      'expected a witness or {"certificate": digest}, got an object with "proof"; correct /constants/0/upper/evidence',
    ],
    [
      'an extra field in a report',
      () => parseReport(text({ ...report, extra: 1 })),
      'unknown-field',
      '/extra',
      'expected only the fields schema, model, markov, symmetry, state, fixedPoints, primitive, jumps, canonicalResidual, spectrum, notes, tool, got "extra"; remove it or correct its spelling',
    ],
    [
      'a broken eigenvalue',
      () => parseReport(text({ ...report, spectrum: [[1]] })),
      'wrong-schema',
      '/spectrum/0',
      'expected a number or [re, im], got a list of 1; correct /spectrum/0',
    ],
    [
      'a state of another schema',
      () => parseState('{"schema": "thalweg.states/1", "matrix": [[1]]}'),
      'wrong-schema',
      '/schema',
      'expected "thalweg.state/1", got the text "thalweg.states/1"; correct /schema',
    ],
    [
      'a state without schema',
      () => parseState('{"matrix": [[1]]}'),
      'wrong-schema',
      '',
      'expected a matrix: rows of numbers, {"re", "im"}, {"shape", "entries"}, {"pauli"} or {"file"}, got an object with "matrix"; correct the document',
    ],
    [
      'a ragged state',
      () => parseState('[[1, 0], [0]]'),
      'ragged-matrix',
      '/1',
      'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long',
    ],
  ];
  it.each(cases)('refuses %s', (_name, run, code, pointer, message) => {
    expect(refusal(run)).toEqual([code, pointer, message]);
  });
});

describe('documents of core results', () => {
  const coreWitness = {
    constant: 'ge',
    mean: 'left',
    value: 0.5,
    state: toDense(decodeMatrix(witness.state)),
    observable: toDense(decodeMatrix(witness.observable)),
    amplification: 1,
  } as const;

  it('writes and reads a witness', () => {
    const document = encodeWitness(coreWitness, DIGEST);
    expect(parseWitness(text(document))).toStrictEqual(witness);
    expect(decodeWitness(parseWitness(text(document)))).toEqual(coreWitness);
    expect(encodeWitness({ ...coreWitness, observable: null }, DIGEST, TOOL)).toMatchObject({
      observable: null,
      tool: TOOL,
    });
    const ragged = { ...witness, constant: 'ge', mean: 'left', state: [[1], [1, 2]] } as const;
    expect(refusal(() => decodeWitness({ ...ragged, state: [[1], [1, 2]] }, { pointer: '/evidence' }))[1]).toBe(
      '/evidence/state/1',
    );
  });

  it('writes ends that the schema accepts, infinite ones as null with their reason', () => {
    const bracket = encodeBracket({
      lower: { value: -Infinity, grade: 'certified', by: 'no lift exists', margin: 1 },
      upper: { value: 2, grade: 'observed', by: 'search', margin: 1e-9, evidence: coreWitness },
    });
    expect(bracket.lower).toEqual({
      value: null,
      grade: 'certified',
      by: 'unbounded',
      unbounded: 'below',
      note: 'no lift exists',
    });
    expect(parseSheet(withConstant(bracket)).constants[0]).toMatchObject(bracket);
    expect(encodeBracket({ lower: null, upper: null })).toEqual({ lower: null, upper: null });
    expect(encodeEnd({ value: 1, grade: 'exact', by: 'a rule' })).toEqual({ value: 1, grade: 'exact', by: 'a rule' });
  });
});
