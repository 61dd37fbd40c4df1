import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { isSparse } from '../../src/matrix/decode-matrix.js';
import { encodeMatrix } from '../../src/matrix/encode-matrix.js';
import { readMtx } from '../../src/mtx/read-mtx.js';
import { refusal } from '../support/caught-error.js';

const read = (text: string) => encodeMatrix(readMtx(new TextEncoder().encode(text)));
const coordinate = (kind: string, ...lines: string[]) =>
  `%%MatrixMarket matrix coordinate ${kind}\n${lines.join('\n')}\n`;
const array = (kind: string, ...lines: string[]) => `%%MatrixMarket matrix array ${kind}\n${lines.join('\n')}\n`;

describe('readMtx', () => {
  it('reads coordinates as a sparse matrix, counted from 1', () => {
    const matrix = readMtx(new TextEncoder().encode(coordinate('real general', '2 3 2', '1 3 -1.5e1', '2 1 .25')));
    expect(isSparse(matrix)).toBe(true);
    expect(encodeMatrix(matrix)).toEqual([
      [0, 0, -15],
      [0.25, 0, 0],
    ]);
  });

  it('reads arrays column by column', () => {
    expect(read(array('integer general', '2 2', '1', '2', '+3', '-4'))).toEqual([
      [1, 3],
      [2, -4],
    ]);
  });

  it('fills in what symmetry implies', () => {
    expect(read(coordinate('pattern symmetric', '2 2 2', '1 1', '2 1'))).toEqual([
      [1, 1],
      [1, 0],
    ]);
    expect(read(coordinate('complex hermitian', '2 2 2', '2 1 1 2', '2 2 5 0'))).toEqual({
      re: [
        [0, 1],
        [1, 5],
      ],
      im: [
        [0, -2],
        [2, 0],
      ],
    });
    expect(read(array('complex hermitian', '2 2', '1 0', '3 4', '2 0'))).toEqual({
      re: [
        [1, 3],
        [3, 2],
      ],
      im: [
        [0, -4],
        [4, 0],
      ],
    });
    expect(read(coordinate('complex skew-symmetric', '2 2 1', '2 1 1 2'))).toEqual({
      re: [
        [0, -1],
        [1, 0],
      ],
      im: [
        [0, -2],
        [2, 0],
      ],
    });
  });

  it('reads a skew-symmetric array with or without the zeros of its diagonal', () => {
    const expected = [
      [0, -1, -2],
      [1, 0, -3],
      [2, 3, 0],
    ];
    expect(read(array('real skew-symmetric', '3 3', '1', '2', '3'))).toEqual(expected);
    expect(read(array('real skew-symmetric', '3 3', '0', '1', '2', '0', '3', '0'))).toEqual(expected);
  });

  it('skips comments, empty lines, spaces and carriage returns; words of the banner in any case', () => {
    const text =
      '%%matrixmarket MATRIX Coordinate Real General\r\n% é\r\n\r\n%\r\n  1\t1  1 \r\n\r\n% more\r\n 1 1 7\r\n\r\n';
    expect(read(text)).toEqual([[7]]);
    expect(read('%%MatrixMarket matrix array real general\n1 1\n7')).toEqual([[7]]);
  });

  const size = 'the number of rows, the number of columns, the number of entries';
  const cases: [name: string, text: string, code: string, message: string][] = [
    [
      'an empty file',
      '',
      'bad-file',
      'expected a Matrix Market file (it starts with %%MatrixMarket), got the text ""; write it with scipy.io.mmwrite',
    ],
    [
      'another file',
      '1 2 3\n',
      'bad-file',
      'expected a Matrix Market file (it starts with %%MatrixMarket), got the text "1 2 3"; write it with scipy.io.mmwrite',
    ],
    [
      'a vector',
      '%%MatrixMarket vector coordinate real general\n',
      'not-supported',
      'expected a Matrix Market "matrix", got the text "vector"; write the matrix with scipy.io.mmwrite',
    ],
    [
      'a short banner',
      '%%MatrixMarket matrix array real\n',
      'bad-file',
      'expected three words for format, field and symmetry after "matrix", got 2; write for example %%MatrixMarket matrix coordinate complex general',
    ],
    [
      'an unknown format',
      coordinate('real general').replace('coordinate', 'dense'),
      'bad-file',
      'expected a Matrix Market format coordinate, array, got the text "dense"; correct the first line',
    ],
    [
      'an unknown field',
      coordinate('quaternion general'),
      'bad-file',
      'expected a Matrix Market field real, complex, integer, pattern, got the text "quaternion"; correct the first line',
    ],
    [
      'an unknown symmetry',
      coordinate('real normal'),
      'bad-file',
      'expected a Matrix Market symmetry general, symmetric, hermitian, skew-symmetric, got the text "normal"; correct the first line',
    ],
    [
      'a pattern array',
      array('pattern general', '1 1'),
      'not-supported',
      'expected a combination that Matrix Market defines, got array pattern general; hermitian goes with complex, pattern with coordinate general or symmetric',
    ],
    [
      'a real Hermitian file',
      coordinate('real hermitian', '1 1 0'),
      'not-supported',
      'expected a combination that Matrix Market defines, got coordinate real hermitian; hermitian goes with complex, pattern with coordinate general or symmetric',
    ],
    [
      'no size line',
      coordinate('real general'),
      'bad-file',
      `expected ${size}, got nothing (line 2); correct the line`,
    ],
    [
      'a short size line',
      coordinate('real general', '2 2'),
      'bad-file',
      `expected ${size}, got the text "2 2" (line 2); correct the line`,
    ],
    [
      'zero rows',
      coordinate('real general', '0 2 0'),
      'bad-file',
      'expected a number of rows, counted from 1, got the text "0" (line 2); write a whole number',
    ],
    [
      'a negative count',
      coordinate('real general', '2 2 -1'),
      'bad-file',
      'expected a number of entries of at least 0, got the text "-1" (line 2); write a whole number',
    ],
    [
      'a rectangular symmetric file',
      coordinate('real symmetric', '2 3 0'),
      'dimension-mismatch',
      'expected a square matrix since the file is symmetric, got 2×3; correct the file',
    ],
    [
      '10^12 rows',
      coordinate('real general', '1000000000000 1 0'),
      'too-large',
      'expected a matrix of at most 4096 rows and columns, got 1000000000000×1; reduce the model',
    ],
    [
      '10^12 entries',
      coordinate('real general', '10 10 1000000000000'),
      'too-large',
      'expected a sparse matrix of at most 2097152 entries, got 1000000000000; reduce the model',
    ],
    [
      'a huge array',
      array('real general', '4000 4000'),
      'too-large',
      'expected a dense matrix of at most 4096 rows and columns and 4194304 entries, got 4000×4000; write it as entries or Pauli strings if it is sparse',
    ],
    [
      'too few entries',
      coordinate('real general', '2 2 3', '1 1 1', '2 2 1'),
      'truncated-file',
      'expected 3 entries as the size line says, got 2; copy the file again or correct the size line',
    ],
    [
      'too many entries',
      coordinate('real general', '2 2 1', '1 1 1', '2 2 1'),
      'bad-file',
      'expected the end of the file after 1 entry, got more lines (line 4); correct the size line',
    ],
    [
      'too few array entries',
      array('real general', '2 2', '1', '2', '3'),
      'truncated-file',
      'expected 4 entries as the size line says, got 3; copy the file again or correct the size line',
    ],
    [
      'too many array entries',
      array('real general', '1 1', '1', '2'),
      'bad-file',
      'expected the end of the file after 1 entry, got more lines (line 4); correct the size line',
    ],
    [
      'a skew-symmetric array of a wrong length',
      array('real skew-symmetric', '3 3', '1', '2', '3', '4'),
      'bad-file',
      'expected 3 entries below the diagonal, got 4 (line 6); correct the size line',
    ],
    [
      'an index of 0',
      coordinate('real general', '2 2 1', '0 1 1'),
      'bad-file',
      'expected a row, counted from 1, got the text "0" (line 3); write a whole number',
    ],
    [
      'an index beyond the size',
      coordinate('real general', '2 2 1', '1 3 1'),
      'bad-file',
      'expected a column between 1 and 2, got 3 (line 3); correct the entry or the size line',
    ],
    [
      'a fractional index',
      coordinate('real general', '2 2 1', '1.5 1 1'),
      'bad-file',
      'expected a row, counted from 1, got the text "1.5" (line 3); write a whole number',
    ],
    [
      'an entry twice',
      coordinate('real general', '2 2 2', '1 2 1', '1 2 1'),
      'bad-file',
      'expected each place once, got row 1, column 2 again (line 4); add the duplicates up',
    ],
    [
      'a missing value',
      coordinate('complex general', '2 2 1', '1 2 1'),
      'bad-file',
      'expected a row, a column, a real part, an imaginary part, got the text "1 2 1" (line 3); correct the line',
    ],
    [
      'a value too many',
      coordinate('pattern general', '2 2 1', '1 2 1'),
      'bad-file',
      'expected a row, a column, got the text "1 2 1" (line 3); correct the line',
    ],
    [
      'an entry above the diagonal',
      coordinate('real symmetric', '2 2 1', '1 2 1'),
      'bad-file',
      'expected entries on or below the diagonal since the file is symmetric, got row 1, column 2 (line 3); leave it out',
    ],
    [
      'a skew-symmetric diagonal',
      coordinate('real skew-symmetric', '2 2 1', '2 2 1'),
      'bad-file',
      'expected zero on the diagonal since the file is skew-symmetric, got 1 + 0i at row 2, column 2; correct it',
    ],
    [
      'a complex Hermitian diagonal',
      array('complex hermitian', '1 1', '1 2'),
      'bad-file',
      'expected a real number on the diagonal since the file is hermitian, got 1 + 2i at row 1, column 1; correct it',
    ],
    [
      'a NaN',
      coordinate('real general', '1 1 1', '1 1 nan'),
      'not-finite',
      'expected finite entries, got nan (line 3); correct the file',
    ],
    [
      'a number beyond the double range',
      coordinate('real general', '1 1 1', '1 1 -1e999'),
      'not-finite',
      'expected finite entries, got -1e999 (line 3); correct the file',
    ],
    [
      'a word',
      coordinate('real general', '1 1 1', '1 1 one'),
      'bad-file',
      'expected a decimal number, got the text "one" (line 3); write for example 1.5e-3',
    ],
    [
      'a hexadecimal number',
      coordinate('real general', '1 1 1', '1 1 0x10'),
      'bad-file',
      'expected a decimal number, got the text "0x10" (line 3); write for example 1.5e-3',
    ],
    [
      'a fraction in an integer file',
      coordinate('integer general', '1 1 1', '1 1 1.5'),
      'bad-file',
      'expected a whole number, got the text "1.5" (line 3); write a whole number',
    ],
  ];
  it.each(cases)('refuses %s', (_name, text, code, message) => {
    const [gotCode, , gotMessage] = refusal(() => read(text));
    expect([gotCode, gotMessage]).toEqual([code, message]);
  });

  it('reads back every matrix written by hand', () => {
    const number = fc.double({ noNaN: true, noDefaultInfinity: true });
    const matrices = fc
      .tuple(fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 4 }))
      .chain(([rows, cols]) =>
        fc.tuple(
          fc.constant(rows),
          fc.constant(cols),
          fc.array(fc.tuple(number, number), { minLength: rows * cols, maxLength: rows * cols }),
        ),
      );
    fc.assert(
      fc.property(matrices, ([rows, cols, values]) => {
        const places = values.map(([x, y], k) => `${1 + (k % rows)} ${1 + Math.floor(k / rows)} ${x} ${y}`);
        const asArray = read(array('complex general', `${rows} ${cols}`, ...values.map(([x, y]) => `${x} ${y}`)));
        const asEntries = read(coordinate('complex general', `${rows} ${cols} ${rows * cols}`, ...places));
        expect(asEntries).toEqual(asArray);
        const re = Array.from({ length: rows }, (_, i) =>
          Array.from({ length: cols }, (_, j) => values[j * rows + i]?.[0] ?? NaN),
        );
        expect(Array.isArray(asArray) ? asArray : asArray.re).toEqual(re.map((row) => row.map((x) => x + 0)));
      }),
    );
  });

  it('never throws anything but a ThalwegError', () => {
    const words = fc.constantFrom(
      ...[
        '%%MatrixMarket',
        'matrix',
        'coordinate',
        'array',
        'real',
        'complex',
        'pattern',
        'general',
        'symmetric',
        'skew-symmetric',
      ],
      ...['hermitian', '1', '2', '3', '0', '-1', '1e9', 'nan', '%', '\n', '\n', '\n', ' '],
    );
    const bodies = fc.array(words, { maxLength: 30 }).map((parts) => parts.join(' '));
    const texts = fc.oneof(
      bodies,
      fc
        .tuple(
          fc.constantFrom(
            'coordinate real general',
            'coordinate complex hermitian',
            'array real skew-symmetric',
            'array complex general',
          ),
          bodies,
        )
        .map(([kind, body]) => `%%MatrixMarket matrix ${kind}\n2 2${kind.startsWith('c') ? ' 2' : ''}\n${body}`),
    );
    fc.assert(
      fc.property(
        fc.oneof(
          texts.map((text) => new TextEncoder().encode(text)),
          fc.uint8Array(),
        ),
        (bytes) => {
          try {
            const { rows, cols } = readMtx(bytes);
            expect(Math.min(rows, cols)).toBeGreaterThan(0);
          } catch (error) {
            expect(error).toBeInstanceOf(ThalwegError);
          }
        },
      ),
      { numRuns: 2000 },
    );
  });
});
