import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError, kronecker, fromRows, type ComplexMatrix } from '@thalweg/core';
import { decodeMatrix, isSparse, toDense, toSparse } from '../../src/matrix/decode-matrix.js';
import { encodeMatrix } from '../../src/matrix/encode-matrix.js';
import type { MatrixDocument } from '../../src/matrix/matrix-document.js';
import { refusal } from '../support/caught-error.js';

const X = fromRows([
  [0, 1],
  [1, 0],
]);
const Y = fromRows(
  [
    [0, 0],
    [0, 0],
  ],
  [
    [0, -1],
    [1, 0],
  ],
);
const Z = fromRows([
  [1, 0],
  [0, -1],
]);
const I = fromRows([
  [1, 0],
  [0, 1],
]);
const PAULIS: Record<string, ComplexMatrix> = { I, X, Y, Z };

/** The plain path: a Kronecker product of 2×2 matrices, first letter first. */
function pauliByKronecker(string: string): ComplexMatrix {
  return [...string].map((letter) => PAULIS[letter] ?? I).reduce((product, factor) => kronecker(product, factor));
}

const plain = (matrix: MatrixDocument) => encodeMatrix(decodeMatrix(matrix));

describe('decodeMatrix', () => {
  it('reads real rows, parts and entries', () => {
    expect(plain([[1, 0.5]])).toEqual([[1, 0.5]]);
    expect(plain({ re: [[1], [2]], im: [[0], [-3]] })).toEqual({ re: [[1], [2]], im: [[0], [-3]] });
    const entries = decodeMatrix({
      shape: [2, 3],
      entries: [
        [1, 2, 0, -1],
        [0, 0, 4, 0],
      ],
    });
    expect(isSparse(entries)).toBe(true);
    expect(encodeMatrix(entries)).toEqual({
      re: [
        [4, 0, 0],
        [0, 0, 0],
      ],
      im: [
        [0, 0, 0],
        [0, 0, -1],
      ],
    });
    expect(plain({ shape: [1, 2], entries: [] })).toEqual([[0, 0]]);
  });

  it('gives the Pauli matrices', () => {
    expect(plain({ pauli: 'X' })).toEqual([
      [0, 1],
      [1, 0],
    ]);
    expect(plain({ pauli: 'Y' })).toEqual({
      re: [
        [0, 0],
        [0, 0],
      ],
      im: [
        [0, -1],
        [1, 0],
      ],
    });
    expect(plain({ pauli: 'Z' })).toEqual([
      [1, 0],
      [0, -1],
    ]);
    expect(plain({ pauli: 'XI' })).toEqual([
      [0, 0, 1, 0],
      [0, 0, 0, 1],
      [1, 0, 0, 0],
      [0, 1, 0, 0],
    ]);
  });

  it('agrees with Kronecker products on every Pauli string and combination', () => {
    const strings = fc.integer({ min: 1, max: 5 }).chain((n) =>
      fc.dictionary(
        fc.string({ unit: fc.constantFrom('I', 'X', 'Y', 'Z'), minLength: n, maxLength: n }),
        fc.integer({ min: -9, max: 9 }),
        {
          minKeys: 1,
          maxKeys: 6,
        },
      ),
    );
    fc.assert(
      fc.property(strings, (pauli) => {
        const [first = ''] = Object.keys(pauli);
        const decoded = toDense(decodeMatrix({ pauli }));
        const size = 4 ** first.length;
        const re = new Float64Array(size);
        const im = new Float64Array(size);
        for (const [string, coefficient] of Object.entries(pauli)) {
          const product = pauliByKronecker(string);
          for (let k = 0; k < size; k++) {
            re[k] = (re[k] ?? 0) + coefficient * (product.re[k] ?? 0);
            im[k] = (im[k] ?? 0) + coefficient * (product.im[k] ?? 0);
          }
        }
        expect(decoded.re).toEqual(re.map((x) => x + 0));
        expect(decoded.im).toEqual(im.map((y) => y + 0));
        if (Object.keys(pauli).length === 1)
          expect(plain({ pauli: first })).toEqual(encodeMatrix(pauliByKronecker(first)));
      }),
    );
  });

  it('keeps ten qubits small', () => {
    const chain = Object.fromEntries(
      Array.from({ length: 9 }, (_, k) => [`${'I'.repeat(k)}ZZ${'I'.repeat(8 - k)}`, 1] as const),
    );
    const matrix = decodeMatrix({ pauli: { ...chain, XIIIIIIIII: 0.5 } });
    expect(isSparse(matrix)).toBe(true);
    expect(matrix.rows).toBe(1024);
    expect(matrix.re.length).toBeLessThanOrEqual(2048);
  });

  it('converts between dense and sparse', () => {
    const dense = decodeMatrix([
      [0, 2],
      [0, 0],
    ]);
    expect(isSparse(dense)).toBe(false);
    expect(toSparse(dense).re).toEqual(Float64Array.of(2));
    expect(toDense(toSparse(dense))).toEqual(dense);
    const wide = decodeMatrix({ shape: [4096, 4096], entries: [] });
    expect(refusal(() => toDense(wide))).toEqual([
      'too-large',
      '',
      'expected a dense matrix of at most 4096 rows and columns and 4194304 entries, got 4096×4096; write it as entries or Pauli strings if it is sparse',
    ]);
  });

  it('round-trips every dense matrix through the plain form', () => {
    const number = fc.double({ noNaN: true, noDefaultInfinity: true });
    const parts = fc.tuple(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 5 })).chain(([r, c]) => {
      const rows = fc.array(fc.array(number, { minLength: c, maxLength: c }), { minLength: r, maxLength: r });
      return fc.record({ re: rows, im: rows });
    });
    fc.assert(
      fc.property(parts, (matrix) => {
        const once = plain(matrix);
        expect(plain(once)).toEqual(once);
        const zeroFree = (rows: number[][]) => rows.map((row) => row.map((x) => x + 0));
        const real = matrix.im.flat().every((y) => y === 0);
        expect(once).toEqual(real ? zeroFree(matrix.re) : { re: zeroFree(matrix.re), im: zeroFree(matrix.im) });
        expect(encodeMatrix(toSparse(decodeMatrix(matrix)))).toEqual(once);
      }),
    );
  });

  const cases: [name: string, matrix: unknown, code: string, pointer: string, message: string][] = [
    [
      'no rows',
      [],
      'dimension-mismatch',
      '/m',
      'expected rows of numbers, got an empty list; write for example [[1,0],[0,-1]]',
    ],
    [
      'an empty row',
      [[]],
      'wrong-schema',
      '/m/0',
      'expected a row of numbers, got an empty list; write for example [1,0]',
    ],
    ['a flat list', [1, 2], 'wrong-schema', '/m/0', 'expected a row of numbers, got 1; write for example [1,0]'],
    [
      'ragged rows',
      [[1, 2], [3]],
      'ragged-matrix',
      '/m/1',
      'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long',
    ],
    ['a NaN', [[1, NaN]], 'not-finite', '/m/0/1', 'expected a finite number, got NaN; correct the entry'],
    [
      'an infinity',
      [[1], [-Infinity]],
      'not-finite',
      '/m/1/0',
      'expected a finite number, got -Infinity; correct the entry',
    ],
    [
      'complex pairs in rows',
      [[[1, 0]]],
      'wrong-schema',
      '/m/0/0',
      'expected a number, got a list of 2; write a number, and complex matrices as {"re": rows, "im": rows}',
    ],
    [
      'ragged imaginary rows',
      {
        re: [
          [1, 2],
          [3, 4],
        ],
        im: [[1, 2], [3]],
      },
      'ragged-matrix',
      '/m/im/1',
      'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long',
    ],
    [
      'parts of different shapes',
      { re: [[1, 2]], im: [[1], [2]] },
      'dimension-mismatch',
      '/m/im',
      'expected an imaginary part of the shape 1×2 of the real part, got 2×1; give both the same shape',
    ],
    [
      'a broken shape',
      { shape: [2, 0], entries: [] },
      'wrong-schema',
      '/m/shape',
      'expected a shape [rows, columns] of positive whole numbers, got [2,0]; correct it',
    ],
    [
      'a huge shape',
      { shape: [1e6, 1e6], entries: [] },
      'too-large',
      '/m/shape',
      'expected a matrix of at most 4096 rows and columns, got 1000000×1000000; reduce the model',
    ],
    [
      'an entry outside',
      { shape: [2, 2], entries: [[0, 2, 1, 0]] },
      'dimension-mismatch',
      '/m/entries/0',
      'expected a place inside 2×2, counted from 0, got row 0, column 2; correct the entry or the shape',
    ],
    [
      'a fractional index',
      { shape: [2, 2], entries: [[0.5, 0, 1, 0]] },
      'dimension-mismatch',
      '/m/entries/0',
      'expected a place inside 2×2, counted from 0, got row 0.5, column 0; correct the entry or the shape',
    ],
    [
      'a short entry',
      { shape: [2, 2], entries: [[0, 0, 1]] },
      'wrong-schema',
      '/m/entries/0',
      'expected an entry [row, column, re, im], got a list of 3; write for example [0,1,1,0]',
    ],
    [
      'a duplicate entry',
      {
        shape: [2, 2],
        entries: [
          [0, 1, 1, 0],
          [1, 1, 1, 0],
          [0, 1, 2, 0],
        ],
      },
      'wrong-schema',
      '/m/entries/2',
      'expected each place once, got an entry at row 0, column 1 a second time; keep one',
    ],
    [
      'an infinite entry',
      { shape: [2, 2], entries: [[0, 1, Infinity, 0]] },
      'not-finite',
      '/m/entries/0',
      'expected finite numbers re and im, got Infinity; correct the entry',
    ],
    [
      'a text as an entry',
      { shape: [2, 2], entries: [[0, 1, 0, '1']] },
      'wrong-schema',
      '/m/entries/0',
      'expected finite numbers re and im, got the text "1"; correct the entry',
    ],
    [
      'a wrong Pauli letter',
      { pauli: 'XA' },
      'wrong-schema',
      '/m/pauli',
      'expected a Pauli string of the letters I, X, Y, Z, got the text "XA"; write for example "XIZ"',
    ],
    [
      'an empty Pauli string',
      { pauli: '' },
      'wrong-schema',
      '/m/pauli',
      'expected a Pauli string of the letters I, X, Y, Z, got the text ""; write for example "XIZ"',
    ],
    [
      'no Pauli strings',
      { pauli: {} },
      'wrong-schema',
      '/m/pauli',
      'expected at least one Pauli string, got an empty object; write for example {"XI": 0.5, "ZZ": -1}',
    ],
    [
      'Pauli strings of different lengths',
      { pauli: { XX: 1, Z: 1 } },
      'dimension-mismatch',
      '/m/pauli/Z',
      'expected Pauli strings of 2 letters as the first, got 1 in "Z"; pad with I',
    ],
    [
      'an infinite coefficient',
      { pauli: { X: Infinity } },
      'not-finite',
      '/m/pauli/X',
      'expected a real coefficient, got Infinity; write a finite number',
    ],
    [
      'too many qubits',
      { pauli: 'X'.repeat(13) },
      'too-large',
      '/m/pauli',
      'expected a Pauli string of at most 12 letters, got 13 (a matrix of 2^13 rows); reduce the model',
    ],
    [
      'a very long Pauli string',
      { pauli: 'Z'.repeat(5000) },
      'too-large',
      '/m/pauli',
      'expected a Pauli string of at most 12 letters, got 5000 (a matrix of 2^5000 rows); reduce the model',
    ],
  ];
  it.each(cases)('refuses %s', (_name, matrix, code, pointer, message) => {
    expect(refusal(() => decodeMatrix(matrix as MatrixDocument, { pointer: '/m' }))).toEqual([code, pointer, message]);
  });

  it('refuses sizes above the limits given', () => {
    const limits = { side: 8, denseEntries: 6, sparseEntries: 3 };
    expect(
      refusal(() =>
        decodeMatrix(
          [
            [1, 2, 3, 4],
            [1, 2, 3, 4],
          ],
          { limits },
        ),
      )[0],
    ).toBe('too-large');
    expect(refusal(() => decodeMatrix({ pauli: 'XX' }, { limits }))).toEqual([
      'too-large',
      '/pauli',
      'expected a sparse matrix of at most 3 entries, got 4; reduce the model',
    ]);
    const entries: [number, number, number, number][] = [0, 1, 2, 3].map((k) => [k, k, 1, 0]);
    expect(refusal(() => decodeMatrix({ shape: [4, 4], entries }, { limits }))[1]).toBe('/entries');
  });

  it('throws nothing but ThalwegError on forms with wrong values', () => {
    const value = fc.anything({ maxDepth: 2, withBigInt: true });
    const forms = fc.oneof(
      fc.array(fc.array(value)),
      fc.record({ re: fc.array(fc.array(value)), im: fc.array(fc.array(value)) }),
      fc.record({
        shape: fc.array(value),
        entries: fc.array(fc.oneof(value, fc.array(fc.oneof(fc.integer(), value)))),
      }),
      fc.record({
        pauli: fc.oneof(fc.string(), fc.dictionary(fc.string({ unit: fc.constantFrom('X', 'Z', 'a') }), fc.double())),
      }),
      fc.record({ file: fc.string() }),
    );
    fc.assert(
      fc.property(forms, (matrix) => {
        try {
          decodeMatrix(matrix as MatrixDocument);
        } catch (error) {
          expect(error).toBeInstanceOf(ThalwegError);
        }
      }),
      { numRuns: 1000 },
    );
  });
});
