import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { parseJson } from '../../src/json/parse-json.js';
import { caughtError, refusal } from '../support/caught-error.js';

const bytes = (...values: number[]) => Uint8Array.from(values);

describe('parseJson', () => {
  it('agrees with JSON.parse on every JSON value', () => {
    fc.assert(
      fc.property(fc.json({ maxDepth: 6 }), fc.constantFrom(undefined, 2, '\t'), (text, space) => {
        const value: unknown = JSON.parse(text);
        fc.pre(!text.includes('__proto__'));
        expect(parseJson(JSON.stringify(value, null, space))).toStrictEqual(value);
      }),
    );
  });

  it('never throws anything but a ThalwegError, and accepts nothing that JSON.parse refuses', () => {
    const texts = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.string({ unit: fc.constantFrom(...'{}[]",:\\u0123456789eE+-. \ntruefalsn') }),
      fc.tuple(fc.json(), fc.nat(), fc.string({ maxLength: 2 })).map(([text, at, insert]) => {
        const place = at % (text.length + 1);
        return text.slice(0, place) + insert + text.slice(place + 1);
      }),
    );
    fc.assert(
      fc.property(texts, (text) => {
        let value: unknown;
        try {
          value = parseJson(text);
        } catch (error) {
          expect(error).toBeInstanceOf(ThalwegError);
          return;
        }
        expect(JSON.parse(text)).toEqual(value);
      }),
      { numRuns: 2000 },
    );
  });

  it('reads UTF-8 bytes and skips a byte order mark', () => {
    expect(parseJson(new TextEncoder().encode('{"σ": "𝔐"}'))).toEqual({ σ: '𝔐' });
    expect(parseJson(bytes(0xef, 0xbb, 0xbf, 0x5b, 0x31, 0x5d))).toEqual([1]);
    expect(refusal(() => parseJson(bytes(0x22, 0xff, 0x22)))).toEqual([
      'not-json',
      undefined,
      'expected UTF-8 text, got bytes that are not UTF-8; save the file in UTF-8',
    ]);
  });

  it('keeps numbers as JavaScript reads them', () => {
    expect(parseJson('[0, -0, 1e3, 1E-2, 123456789012345680000, 5e-324, 1e-400]')).toEqual([
      0, -0, 1000, 0.01, 123456789012345680000, 5e-324, 0,
    ]);
  });

  it('names field, line and column', () => {
    const error = caughtError(() => parseJson('{\n  "a": [1,\n    2, x]\n}'));
    expect(error.message).toBe(
      'expected a JSON value, got x (line 3, column 8); write a number, a text in double quotes, [...], {...}, true, false or null',
    );
    expect(error.pointer).toBe('/a/2');
    expect(error.details).toEqual({ line: 3, column: 8, offset: 20 });
  });

  const cases: [name: string, text: string, code: string, pointer: string, message: string][] = [
    [
      'a duplicate key',
      '{"a": 1, "a": 1}',
      'duplicate-key',
      '/a',
      'expected each field once, got "a" again (line 1, column 10); remove one of them',
    ],
    [
      'a duplicate key behind an escape',
      '{"a": 1, "\\u0061": 1}',
      'duplicate-key',
      '/a',
      'expected each field once, got "a" again (line 1, column 10); remove one of them',
    ],
    [
      'a nested duplicate key',
      '[{"x/y": {"k": 0, "k": 0}}]',
      'duplicate-key',
      '/0/x~1y/k',
      'expected each field once, got "k" again (line 1, column 19); remove one of them',
    ],
    [
      'the key __proto__',
      '{"__proto__": {"polluted": 1}}',
      'unknown-field',
      '/__proto__',
      'expected the fields of a document, got "__proto__" (line 1, column 2); remove it',
    ],
    [
      'NaN',
      '[NaN]',
      'not-finite',
      '/0',
      'expected a finite number, got NaN (line 1, column 2); JSON has no such number: leave it out',
    ],
    [
      '-Infinity',
      '{"a": -Infinity}',
      'not-finite',
      '/a',
      'expected a finite number, got -Infinity (line 1, column 7); JSON has no such number: leave it out',
    ],
    [
      'a number beyond the double range',
      '[1e309]',
      'not-finite',
      '/0',
      'expected a number below 1.8e308 in size, got 1e309 (line 1, column 2); write a finite number',
    ],
    [
      'half a surrogate pair, escaped',
      '["\\ud834"]',
      'not-json',
      '/0',
      'expected Unicode text, got half of a surrogate pair (line 1, column 2); write both halves or remove it',
    ],
    [
      'half a surrogate pair, raw',
      '["\ud834"]',
      'not-json',
      '/0',
      'expected Unicode text, got half of a surrogate pair (line 1, column 2); write both halves or remove it',
    ],
    [
      'half a surrogate pair in a key',
      '{"\\udd1e": 1}',
      'not-json',
      '',
      'expected Unicode text, got half of a surrogate pair (line 1, column 2); write both halves or remove it',
    ],
    [
      'a trailing comma in an object',
      '{"a": 1,}',
      'not-json',
      '/a',
      'expected a field name in double quotes, got "}" (line 1, column 9); remove a trailing comma or add the quotes',
    ],
    [
      'a trailing comma in a list',
      '[1,]',
      'not-json',
      '/1',
      'expected a JSON value, got "]" (line 1, column 4); write a number, a text in double quotes, [...], {...}, true, false or null',
    ],
    [
      'single quotes',
      "{'a': 1}",
      'not-json',
      '',
      'expected a field name in double quotes, got "\'" (line 1, column 2); remove a trailing comma or add the quotes',
    ],
    ['a missing colon', '{"a" 1}', 'not-json', '/a', 'expected ":" after "a", got 1 (line 1, column 6); add the colon'],
    [
      'a missing comma in a list',
      '[1 2]',
      'not-json',
      '/0',
      'expected "," or "]" in a list, got 2 (line 1, column 4); close the list or add the comma',
    ],
    [
      'a missing comma in an object',
      '{"a": 1 "b": 2}',
      'not-json',
      '/a',
      'expected "," or "}" in an object, got "\\"" (line 1, column 9); close the object or add the comma',
    ],
    [
      'two documents',
      '{} {}',
      'not-json',
      '',
      'expected the end of the text after the document, got "{" (line 1, column 4); remove what follows',
    ],
    [
      'the empty text',
      '',
      'not-json',
      '',
      'expected a JSON value, got the end of the text (line 1, column 1); write a number, a text in double quotes, [...], {...}, true, false or null',
    ],
    [
      'a leading zero',
      '[01]',
      'not-json',
      '/0',
      'expected a JSON value, got 01 (line 1, column 2); write a number, a text in double quotes, [...], {...}, true, false or null',
    ],
    [
      'an unclosed text',
      '["abc',
      'not-json',
      '/0',
      'expected a text to end, got the end of the text (line 1, column 6); close it with a double quote',
    ],
    [
      'a raw line break in a text',
      '["a\nb"]',
      'not-json',
      '/0',
      'expected no control character inside a text, got "\\n" (line 1, column 4); write line breaks as \\n and tabs as \\t',
    ],
    [
      'a wrong escape',
      '["\\x41"]',
      'not-json',
      '/0',
      'expected an escape such as \\n or \\" after a backslash, got x41 (line 1, column 4); double the backslash to mean itself',
    ],
    [
      'a short \\u escape',
      '["\\u12"]',
      'not-json',
      '/0',
      'expected four hexadecimal digits after \\u, got 12 (line 1, column 5); write for example \\u03c3',
    ],
    [
      'a comment',
      '[1] // one',
      'not-json',
      '',
      'expected the end of the text after the document, got "/" (line 1, column 5); remove what follows',
    ],
  ];
  it.each(cases)('refuses %s', (_name, text, code, pointer, message) => {
    expect(refusal(() => parseJson(text))).toEqual([code, pointer, message]);
  });

  it('bounds depth and length', () => {
    const nested = (depth: number) => '['.repeat(depth) + ']'.repeat(depth);
    expect(parseJson(nested(64))).toBeInstanceOf(Array);
    expect(refusal(() => parseJson(nested(65)))).toEqual([
      'too-large',
      '/0'.repeat(64),
      'expected at most 64 levels of nesting, got more (line 1, column 65); flatten the document',
    ]);
    expect(refusal(() => parseJson(nested(1_000_000)))[0]).toBe('too-large');
    expect(refusal(() => parseJson('[1234]', { depth: 64, length: 5 }))).toEqual([
      'too-large',
      undefined,
      'expected at most 5 characters of JSON, got 6; move large matrices to .npy files',
    ]);
  });

  it('does not touch prototypes', () => {
    const value = parseJson('{"constructor": 1, "toString": 2}') as Record<string, unknown>;
    expect(Object.keys(value)).toEqual(['constructor', 'toString']);
    expect(() => parseJson('{"__proto__": {"polluted": true}}')).toThrow(ThalwegError);
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
  });
});
