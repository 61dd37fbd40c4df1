import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseJson } from '../../src/json/parse-json.js';
import { writeJson } from '../../src/json/write-json.js';
import { refusal } from '../support/caught-error.js';

describe('writeJson', () => {
  it('indents by two and keeps rows of numbers on one line', () => {
    const document = {
      schema: 'x',
      matrix: [
        [1, -0],
        [0.5, 1e-7],
      ],
      none: undefined,
      empty: {},
      list: [],
    };
    expect(writeJson(document)).toBe(`{
  "schema": "x",
  "matrix": [
    [1, 0],
    [0.5, 1e-7]
  ],
  "empty": {},
  "list": []
}
`);
  });

  it('writes what parseJson reads back', () => {
    fc.assert(
      fc.property(fc.jsonValue({ noNegativeZero: true } as fc.JsonSharedConstraints), (value) => {
        const text = JSON.stringify(value);
        fc.pre(!text.includes('__proto__'));
        expect(parseJson(writeJson(value))).toEqual(JSON.parse(text));
      }),
    );
  });

  it('refuses NaN, infinities and what is not data', () => {
    expect(refusal(() => writeJson({ a: [{ b: [1, -Infinity] }] }))).toEqual([
      'not-finite',
      '/a/0/b/1',
      'expected a finite number in a document, got -Infinity; write null with a note',
    ]);
    expect(refusal(() => writeJson({ a: () => 1 }))).toEqual([
      'internal',
      '/a',
      'expected plain data in a document, got a function; leave it out',
    ]);
  });
});
