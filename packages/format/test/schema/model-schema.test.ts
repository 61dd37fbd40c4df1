import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { checkModel, parseModel } from '../../src/schema/parse-document.js';
import { caughtError, refusal } from '../support/caught-error.js';
import { EVERY_FORM } from '../support/every-form.js';

const model = (generator: unknown, more: object = { algebra: [2] }) => ({
  schema: 'thalweg.model/1',
  ...more,
  generator,
});
const X = { pauli: 'X' };
const lindblad = (jump: unknown) => model({ form: 'lindblad', jumps: [jump] });
const davies = (spectrum: unknown) => model({ form: 'davies', hamiltonian: X, couplings: [X], beta: 1, spectrum });
const forms =
  'one of "lindblad", "balanced", "rates", "expectation", "length", "schur", "davies", "superoperator", "sum", "tensor"';
const matrices = 'a matrix: rows of numbers, {"re", "im"}, {"shape", "entries"}, {"pauli"} or {"file"}';

describe('the model schema', () => {
  it.each(Object.entries(EVERY_FORM))('accepts the form %s and changes nothing', (_form, document) => {
    expect(parseModel(JSON.stringify(document))).toStrictEqual(document);
  });

  it('accepts a title, a state and a provenance', () => {
    const document = {
      ...lindblad({
        label: 'σ−',
        rate: 0.5,
        matrix: [
          [0, 1],
          [0, 0],
        ],
      }),
      title: 'Amplitude damping',
      state: { shape: [2, 2], entries: [[0, 0, 1, 0]] },
      provenance: {
        example: 'ada/damping@1.2.0',
        parameters: { gamma: 0.5, names: ['a', null, true] },
        source: '10.1000/182',
        tool: { name: 'thalweg', version: '0.1.0' },
        note: 'for a test',
      },
    };
    expect(checkModel(document)).toStrictEqual(document);
  });

  const cases: [name: string, document: unknown, code: string, pointer: string, message: string][] = [
    ['a list', [], 'wrong-schema', '', 'expected an object, got an empty list; correct the document'],
    ['null', null, 'wrong-schema', '', 'expected an object, got null; correct the document'],
    [
      'no schema',
      { generator: {} },
      'wrong-schema',
      '/schema',
      'expected "thalweg.model/1", got nothing; add the field "schema"',
    ],
    [
      'another schema',
      { schema: 'thalweg.sheet/1', constants: [] },
      'wrong-schema',
      '/schema',
      'expected "thalweg.model/1", got the text "thalweg.sheet/1"; correct /schema',
    ],
    [
      'no generator',
      { schema: 'thalweg.model/1', algebra: [2] },
      'wrong-schema',
      '/generator',
      'expected an object, got nothing; add the field "generator"',
    ],
    [
      'no form',
      model({ jumps: [] }),
      'wrong-schema',
      '/generator/form',
      `expected ${forms}, got nothing; add the field "form"`,
    ],
    [
      'an unknown form',
      model({ form: 'lindbladian', jumps: [] }),
      'wrong-schema',
      '/generator/form',
      `expected ${forms}, got the text "lindbladian"; correct /generator/form`,
    ],
    [
      'an unknown field at the top',
      { ...lindblad({ matrix: X }), algebras: [2] },
      'unknown-field',
      '/algebras',
      'expected only the fields schema, title, algebra, generator, state, provenance, got "algebras"; remove it or correct its spelling',
    ],
    [
      'a field of another form',
      model({ form: 'lindblad', jumps: [], rates: [[0]] }),
      'unknown-field',
      '/generator/rates',
      'expected only the fields form, hamiltonian, jumps, got "rates"; remove it or correct its spelling',
    ],
    [
      'a misspelt field',
      lindblad({ matirx: X }),
      'unknown-field',
      '/generator/jumps/0/matirx',
      'expected only the fields label, rate, matrix, got "matirx"; remove it or correct its spelling',
    ],
    [
      'no jumps',
      model({ form: 'lindblad' }),
      'wrong-schema',
      '/generator/jumps',
      'expected a list, got nothing; add the field "jumps"',
    ],
    [
      'jumps as an object',
      model({ form: 'lindblad', jumps: { 0: X } }),
      'wrong-schema',
      '/generator/jumps',
      'expected a list, got an object with "0"; correct /generator/jumps',
    ],
    [
      'a bare matrix as a jump',
      lindblad([
        [0, 1],
        [1, 0],
      ]),
      'wrong-schema',
      '/generator/jumps/0',
      'expected an object, got a list of 2; correct /generator/jumps/0',
    ],
    [
      'a text as a rate',
      lindblad({ rate: '1', matrix: X }),
      'wrong-schema',
      '/generator/jumps/0/rate',
      'expected a number, got the text "1"; correct /generator/jumps/0/rate',
    ],
    [
      'an infinite rate',
      lindblad({ rate: Infinity, matrix: X }),
      'not-finite',
      '/generator/jumps/0/rate',
      'expected a number, got Infinity; correct /generator/jumps/0/rate',
    ],
    [
      'no matrix',
      lindblad({ rate: 1 }),
      'wrong-schema',
      '/generator/jumps/0/matrix',
      `expected ${matrices}, got nothing; add the field "matrix"`,
    ],
    [
      'a number as a matrix',
      lindblad({ matrix: 3 }),
      'wrong-schema',
      '/generator/jumps/0/matrix',
      `expected ${matrices}, got 3; correct /generator/jumps/0/matrix`,
    ],
    [
      'an empty object as a matrix',
      lindblad({ matrix: {} }),
      'wrong-schema',
      '/generator/jumps/0/matrix',
      `expected ${matrices}, got an empty object; correct /generator/jumps/0/matrix`,
    ],
    [
      'an unknown matrix form',
      lindblad({ matrix: { dense: [] } }),
      'wrong-schema',
      '/generator/jumps/0/matrix',
      `expected ${matrices}, got an object with "dense"; correct /generator/jumps/0/matrix`,
    ],
    [
      'a real part alone',
      lindblad({ matrix: { re: [[1]] } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/im',
      'expected a list, got nothing; add the field "im"',
    ],
    [
      'a misspelt part',
      lindblad({ matrix: { re: [[1]], imm: [[1]] } }),
      'unknown-field',
      '/generator/jumps/0/matrix/imm',
      'expected only the fields re, im, got "imm"; remove it or correct its spelling',
    ],
    [
      'ragged rows',
      lindblad({ matrix: [[1, 2], [3]] }),
      'ragged-matrix',
      '/generator/jumps/0/matrix/1',
      'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long',
    ],
    [
      'a text in a matrix',
      lindblad({ matrix: { re: [[1]], im: [['i']] } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/im/0/0',
      'expected a number, got the text "i"; write a number, and complex matrices as {"re": rows, "im": rows}',
    ],
    [
      'a number as a Pauli string',
      lindblad({ matrix: { pauli: 1 } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/pauli',
      'expected a Pauli string such as "XIZ" or an object of strings with coefficients, got 1; correct /generator/jumps/0/matrix/pauli',
    ],
    [
      'a text as a Pauli coefficient',
      lindblad({ matrix: { pauli: { X: '1' } } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/pauli/X',
      'expected a number, got the text "1"; correct /generator/jumps/0/matrix/pauli/X',
    ],
    [
      'a wrong Pauli letter',
      lindblad({ matrix: { pauli: 'Q' } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/pauli',
      'expected a Pauli string of the letters I, X, Y, Z, got the text "Q"; write for example "XIZ"',
    ],
    [
      'a shape without entries',
      lindblad({ matrix: { shape: [2, 2] } }),
      'wrong-schema',
      '/generator/jumps/0/matrix/entries',
      'expected a list, got nothing; add the field "entries"',
    ],
    [
      'a file outside',
      lindblad({ matrix: { file: '/etc/passwd' } }),
      'outside-folder',
      '/generator/jumps/0/matrix/file',
      'expected a path beside or below the document with forward slashes, got the text "/etc/passwd"; move the file there and name it relative to the document',
    ],
    [
      'no algebra',
      model({ form: 'lindblad', jumps: [] }, {}),
      'wrong-schema',
      '/algebra',
      'expected "algebra", the block sizes, beside a generator of the form "lindblad", got nothing; write for example [2] for a qubit',
    ],
    [
      'no blocks',
      model({ form: 'lindblad', jumps: [] }, { algebra: [] }),
      'wrong-schema',
      '/algebra',
      'expected a list of at least 1 item, got an empty list; correct /algebra',
    ],
    [
      'a block of size zero',
      model({ form: 'lindblad', jumps: [] }, { algebra: [1, 0] }),
      'wrong-schema',
      '/algebra/1',
      'expected a whole number of at least 1, got 0; correct /algebra/1',
    ],
    [
      'a fractional block',
      model({ form: 'lindblad', jumps: [] }, { algebra: [1.5] }),
      'wrong-schema',
      '/algebra/0',
      'expected a whole number, got 1.5; correct /algebra/0',
    ],
    [
      'no frequency',
      model({ form: 'balanced', state: [[1]], terms: [{ matrix: X }] }),
      'wrong-schema',
      '/generator/terms/0/frequency',
      'expected a number, got nothing; add the field "frequency"',
    ],
    [
      'ragged rates',
      model({ form: 'rates', rates: [[0, 1], [1]] }),
      'ragged-matrix',
      '/generator/rates/1',
      'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long',
    ],
    [
      'an unknown target',
      model({ form: 'expectation', onto: { scalars: false } }),
      'wrong-schema',
      '/generator/onto/scalars',
      'expected true, got false; correct /generator/onto/scalars',
    ],
    [
      'a target of two kinds',
      model({ form: 'expectation', onto: { scalars: true, diagonal: true } }),
      'wrong-schema',
      '/generator/onto',
      'expected {"scalars": true}, {"diagonal": true}, {"blocks": [...]} or {"spannedBy": [...]}, got an object with "scalars", "diagonal"; correct /generator/onto',
    ],
    [
      'an unknown group',
      model({ form: 'length', group: { quaternion: 8 }, length: 'word' }),
      'wrong-schema',
      '/generator/group',
      'expected a group: {"cyclic": n}, {"dihedral": n}, {"symmetric": n} or {"table": rows}, got an object with "quaternion"; correct /generator/group',
    ],
    [
      'an empty group',
      model({ form: 'length', group: { cyclic: 0 }, length: 'word' }),
      'wrong-schema',
      '/generator/group/cyclic',
      'expected a whole number of at least 1, got 0; correct /generator/group/cyclic',
    ],
    [
      'an unknown length',
      model({ form: 'length', group: { cyclic: 3 }, length: 'words' }),
      'wrong-schema',
      '/generator/length',
      'expected a length for each element as a list of numbers, or "word", got the text "words"; correct /generator/length',
    ],
    [
      'a text as a length',
      model({ form: 'length', group: { cyclic: 2 }, length: [0, '1'] }),
      'wrong-schema',
      '/generator/length/1',
      'expected a number, got the text "1"; correct /generator/length/1',
    ],
    [
      'a word length for a table',
      model({ form: 'length', group: { table: [[0]] }, length: 'word' }),
      'wrong-schema',
      '/generator/length',
      'expected a list of lengths, one for each element, got "word" for a group given by its table, which names no generators; write the list',
    ],
    [
      'an unknown spectrum',
      davies({ kind: 'white', strength: 1 }),
      'wrong-schema',
      '/generator/spectrum/kind',
      'expected one of "flat", "ohmic", "metropolis", "table", got the text "white"; correct /generator/spectrum/kind',
    ],
    [
      'a negative strength',
      davies({ kind: 'flat', strength: -1 }),
      'wrong-schema',
      '/generator/spectrum/strength',
      'expected a number of at least 0, got -1; correct /generator/spectrum/strength',
    ],
    [
      'a cutoff of zero',
      davies({ kind: 'ohmic', strength: 1, cutoff: 0 }),
      'wrong-schema',
      '/generator/spectrum/cutoff',
      'expected a number above 0, got 0; correct /generator/spectrum/cutoff',
    ],
    [
      'a table without rates',
      davies({ kind: 'table', values: [[1]] }),
      'wrong-schema',
      '/generator/spectrum/values/0',
      'expected a list of at least 2 items, got a list of 1; correct /generator/spectrum/values/0',
    ],
    [
      'an unknown picture',
      model({ form: 'superoperator', matrix: [[0]], picture: 'interaction', stacking: 'rows' }),
      'wrong-schema',
      '/generator/picture',
      'expected one of "heisenberg", "schrodinger", got the text "interaction"; correct /generator/picture',
    ],
    [
      'an empty sum',
      model({ form: 'sum', terms: [] }),
      'wrong-schema',
      '/generator/terms',
      'expected a list of at least 1 item, got an empty list; correct /generator/terms',
    ],
    [
      'a fault deep in a sum',
      model({ form: 'sum', terms: [{ weight: 1, generator: { form: 'schur', point: [] } }] }),
      'unknown-field',
      '/generator/terms/0/generator/point',
      'expected only the fields form, points, got "point"; remove it or correct its spelling',
    ],
    [
      'a factor without algebra',
      model({ form: 'tensor', factors: [{ generator: { form: 'lindblad', jumps: [] } }] }),
      'wrong-schema',
      '/generator/factors/0/algebra',
      'expected "algebra", the block sizes, beside a generator of the form "lindblad", got nothing; write for example [2] for a qubit',
    ],
    [
      'a generator as a factor',
      model({ form: 'tensor', factors: [{ form: 'schur', points: [[0]] }] }),
      'unknown-field',
      '/generator/factors/0/form',
      'expected only the fields schema, title, algebra, generator, state, provenance, got "form"; remove it or correct its spelling',
    ],
    [
      'a long title',
      { ...lindblad({ matrix: X }), title: 'x'.repeat(2001) },
      'wrong-schema',
      '/title',
      `expected a text of at most 2000 characters, got the text "${'x'.repeat(40)}…"; correct /title`,
    ],
    [
      'a function in the provenance',
      { ...lindblad({ matrix: X }), provenance: { parameters: { f: () => 1 } } },
      'wrong-schema',
      '/provenance/parameters/f',
      'expected plain JSON data, got a function; correct /provenance/parameters/f',
    ],
  ];
  it.each(cases)('refuses %s', (_name, document, code, pointer, message) => {
    expect(refusal(() => checkModel(document))).toEqual([code, pointer, message]);
  });

  it('reports few issues for a long list of wrong items', () => {
    const jumps = new Array<number>(20_000).fill(1);
    expect(refusal(() => checkModel(model({ form: 'lindblad', jumps })))).toEqual([
      'wrong-schema',
      '/generator/jumps',
      'expected a list of at most 10000 items, got a list of 20000; correct /generator/jumps',
    ]);
  });

  it('refuses a value that contains itself', () => {
    const sum = { form: 'sum', terms: [] as unknown[] };
    sum.terms.push({ weight: 1, generator: sum });
    expect(refusal(() => checkModel(model(sum)))).toEqual([
      'too-large',
      `/generator${'/terms/0/generator'.repeat(21)}`,
      'expected at most 64 levels of nesting, got more; flatten the document or break the cycle',
    ]);
  });

  it('names the place of a syntax error, too', () => {
    const error = caughtError(() => parseModel('{"schema": "thalweg.model/1", "algebra": [2,]}'));
    expect([error.code, error.pointer]).toEqual(['not-json', '/algebra/1']);
  });

  it('never throws anything but a ThalwegError', () => {
    const strange = fc.oneof(
      fc.anything({ maxDepth: 3, withNullPrototype: true }),
      fc.constantFrom(...Object.values(EVERY_FORM)),
    );
    fc.assert(
      fc.property(strange, fc.object({ maxDepth: 3 }), (value, generator) => {
        for (const document of [
          value,
          model(value),
          model(generator),
          model({ form: 'lindblad', jumps: [{ matrix: value }] }),
        ]) {
          try {
            checkModel(document);
          } catch (error) {
            expect(error).toBeInstanceOf(ThalwegError);
          }
        }
      }),
      { numRuns: 500 },
    );
  });

  it('points at a changed place in any document: one field replaced, removed or added', () => {
    const documents = fc.constantFrom(...Object.values(EVERY_FORM));
    fc.assert(
      fc.property(documents, fc.nat(), fc.constantFrom('replace', 'remove', 'add'), (document, pick, change) => {
        const copy = structuredClone(document) as unknown;
        const places = objectsIn(copy);
        const [object, path] = places[pick % places.length] ?? [{}, ''];
        const keys = Object.keys(object);
        const key = keys[pick % keys.length] ?? '';
        if (change === 'add') object['extra'] = 1;
        else if (change === 'remove') delete object[key];
        else object[key] = Symbol.iterator;
        try {
          expect(checkModel(copy)).toEqual(copy);
          expect(change).toBe('remove');
        } catch (error) {
          if (!(error instanceof ThalwegError)) throw error;
          const isPrefix = (error.pointer ?? '').startsWith(path) || path.startsWith(error.pointer ?? '');
          expect([error.pointer, path, isPrefix]).toEqual([error.pointer, path, true]);
        }
      }),
      { numRuns: 1000 },
    );
  });
});

/** Every object (not list) in a value, with its JSON pointer. */
function objectsIn(value: unknown, path = ''): [Record<string, unknown>, string][] {
  if (typeof value !== 'object' || value === null) return [];
  const own: [Record<string, unknown>, string][] = Array.isArray(value)
    ? []
    : [[value as Record<string, unknown>, path]];
  return [...own, ...Object.entries(value).flatMap(([key, field]) => objectsIn(field, `${path}/${key}`))];
}
