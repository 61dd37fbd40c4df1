import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { readNpy } from '../../src/npy/read-npy.js';
import { refusal } from '../support/caught-error.js';

/** A NumPy file of version 1.0 with the given header text and bytes. */
function npy(header: string, data: ArrayLike<number> = [], version = [1, 0]): Uint8Array {
  const text = new TextEncoder().encode(header);
  const length = version[0] === 1 ? [text.length & 255, text.length >> 8] : [text.length & 255, text.length >> 8, 0, 0];
  return Uint8Array.from([
    0x93,
    ...new TextEncoder().encode('NUMPY'),
    ...version,
    ...length,
    ...text,
    ...Array.from(data),
  ]);
}

const dictionary = (descr: string, order: string, shape: string) =>
  `{'descr': ${descr}, 'fortran_order': ${order}, 'shape': ${shape}, }\n`;

const HEADER = dictionary("'|u1'", 'False', '(2, 2)');

const refuse = (bytes: Uint8Array) => {
  const [code, , message] = refusal(() => readNpy(bytes));
  return [code, message];
};

describe('readNpy', () => {
  it('reads headers in any spacing, order and quotes', () => {
    for (const header of [
      HEADER,
      '{"shape":(2,2),"descr":"|u1","fortran_order":False}',
      "  { 'shape' : ( 2L , 2L , ) ,\n 'fortran_order' : False , 'descr' : '|u1' }   ",
    ]) {
      expect(readNpy(npy(header, [1, 2, 3, 4])).re).toEqual(Float64Array.of(1, 2, 3, 4));
    }
    expect(readNpy(npy(dictionary("'|u1'", 'True', '(2, 2)'), [1, 2, 3, 4])).re).toEqual(Float64Array.of(1, 3, 2, 4));
  });

  it('reads from the middle of a larger buffer', () => {
    const file = npy(dictionary("'<f4'", 'False', '(1, 1)'), [0, 0, 0x80, 0x3f]);
    const padded = new Uint8Array(file.length + 7);
    padded.set(file, 3);
    expect(readNpy(padded.subarray(3, 3 + file.length)).re).toEqual(Float64Array.of(1));
  });

  it.each([
    [
      'a claim of 10^12 entries',
      npy(dictionary("'<f8'", 'False', '(1000000, 1000000)')),
      'too-large',
      'expected a dense matrix of at most 4096 rows and columns and 4194304 entries, got 1000000×1000000; write it as entries or Pauli strings if it is sparse',
    ],
    [
      'a shape beyond whole doubles',
      npy(dictionary("'<f8'", 'False', `(1, ${'9'.repeat(400)})`)),
      'too-large',
      'expected a dense matrix of at most 4096 rows and columns and 4194304 entries, got 1×Infinity; write it as entries or Pauli strings if it is sparse',
    ],
    [
      'a claim of more entries than there are bytes',
      npy(dictionary("'<c16'", 'False', '(2000, 2000)'), [0, 0]),
      'truncated-file',
      'expected 64000000 bytes of entries after the NumPy header, got 2; copy the file again',
    ],
    [
      'a header length beyond the file',
      npy(HEADER).subarray(0, 40),
      'truncated-file',
      'expected a NumPy header of 70 bytes, got a file of 40; copy the file again',
    ],
    [
      'a very long header',
      npy(HEADER.padEnd(20_000)),
      'too-large',
      'expected a NumPy header of at most 10000 bytes, got 20000; save the array again with numpy.save',
    ],
    [
      'another format version',
      npy(HEADER, [], [4, 0]),
      'not-supported',
      'expected NumPy file format 1.0, 2.0 or 3.0, got 4.0; save the array again with numpy.save',
    ],
    [
      'a call in the header',
      npy("{'descr': __import__('os').system('true'), 'fortran_order': False, 'shape': (1, 1)}"),
      'bad-file',
      `expected a Python dictionary of texts, numbers and booleans in the NumPy header, got the text "__import__('os').system('true'), 'fortra…"; save the array again with numpy.save`,
    ],
    [
      'an expression in the shape',
      npy(dictionary("'|u1'", 'False', '(1<<40, 1)')),
      'bad-file',
      'expected a Python dictionary of texts, numbers and booleans in the NumPy header, got the text "<<40, 1), }"; save the array again with numpy.save',
    ],
    [
      'a negative shape',
      npy(dictionary("'|u1'", 'False', '(-1, 1)')),
      'bad-file',
      'expected a Python dictionary of texts, numbers and booleans in the NumPy header, got the text "-1, 1), }"; save the array again with numpy.save',
    ],
    [
      'a text in the shape',
      npy(dictionary("'|u1'", 'False', "('2', 2)")),
      'bad-file',
      'expected a shape such as (2, 2) in the NumPy header, got the text ", 2), }"; save the array again with numpy.save',
    ],
    [
      'a missing field',
      npy("{'descr': '|u1', 'shape': (1, 1)}"),
      'bad-file',
      'expected a NumPy header with descr, fortran_order and shape, got the text "descr", the text "shape"; save the array again with numpy.save',
    ],
    [
      'a field too many',
      npy("{'descr': '|u1', 'fortran_order': False, 'shape': (1, 1), 'x': 'y'}"),
      'bad-file',
      'expected a NumPy header with descr, fortran_order and shape, got the text "descr", the text "fortran_order", the text "shape", the text "x"; save the array again with numpy.save',
    ],
    [
      'a field twice',
      npy("{'shape': (1, 1), 'shape': (2, 2)}"),
      'bad-file',
      'expected each field once, in quotes in the NumPy header, got the text ": (2, 2)}"; save the array again with numpy.save',
    ],
    [
      'words after the dictionary',
      npy(`${HEADER} and more`, [1, 2, 3, 4]),
      'bad-file',
      'expected nothing after the dictionary in the NumPy header, got the text "and more"; save the array again with numpy.save',
    ],
    [
      'an unclosed dictionary',
      npy("{'descr': '|u1'"),
      'bad-file',
      'expected a Python dictionary of texts, numbers and booleans in the NumPy header, got its end; save the array again with numpy.save',
    ],
    [
      'a number as the type',
      npy(dictionary('8', 'False', '(1, 1)')),
      'bad-file',
      "expected a text in quotes, True or False in the NumPy header, got the text \", 'fortran_order': False, 'shape': (1, 1…\"; save the array again with numpy.save",
    ],
    [
      'native byte order',
      npy(dictionary("'=f8'", 'False', '(1, 1)')),
      'not-supported',
      'expected numbers of type bool, int, uint, float16/32/64 or complex64/128, got the NumPy type the text "=f8"; convert the array with .astype(complex) and save it again',
    ],
  ])('refuses %s', (_name, bytes, code, message) => {
    expect(refuse(bytes)).toEqual([code, message]);
  });

  it('never throws anything but a ThalwegError on damaged files', () => {
    const file = npy(dictionary("'<c8'", 'False', '(2, 3)'), new Uint8Array(48));
    const damage = fc.array(fc.tuple(fc.nat({ max: file.length - 1 }), fc.nat({ max: 255 })), { maxLength: 6 });
    fc.assert(
      fc.property(fc.oneof(damage, fc.uint8Array()), (change) => {
        const bytes = change instanceof Uint8Array ? change : file.slice();
        if (!(change instanceof Uint8Array)) for (const [at, value] of change) bytes[at] = value;
        try {
          const { rows, cols, re, im } = readNpy(bytes);
          expect([re.length, im.length]).toEqual([rows * cols, rows * cols]);
        } catch (error) {
          expect(error).toBeInstanceOf(ThalwegError);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('never throws anything but a ThalwegError on strange headers', () => {
    const header = fc
      .array(
        fc.constantFrom(
          "'descr'",
          "'fortran_order'",
          "'shape'",
          "'<f8'",
          'True',
          '(',
          ')',
          '{',
          '}',
          ',',
          ':',
          '[',
          '2',
          '0',
          ' ',
          '\\',
          'e',
        ),
      )
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(header, (text) => {
        expect(() => readNpy(npy(text, new Uint8Array(32)))).toThrow(ThalwegError);
      }),
      { numRuns: 1000 },
    );
  });
});
