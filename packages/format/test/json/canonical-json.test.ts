import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../src/json/canonical-json.js';
import type { JsonValue } from '../../src/json/json-value.js';
import { parseJson } from '../../src/json/parse-json.js';
import { refusal } from '../support/caught-error.js';

/** A double from the hexadecimal of its bits, big-endian, as RFC 8785 Appendix B lists them. */
function fromBits(hex: string): number {
  const view = new DataView(new ArrayBuffer(8));
  view.setBigUint64(0, BigInt(`0x${hex}`));
  return view.getFloat64(0);
}

describe('canonicalJson (RFC 8785)', () => {
  it('reproduces the sample of section 3.2.2 and 3.2.3', () => {
    const input = String.raw`{
      "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
      "literals": [null, true, false]
    }`;
    const expected = String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`;
    expect(canonicalJson(parseJson(input))).toBe(expected);
    const hex =
      '7b226c69746572616c73223a5b6e756c6c2c747275652c66616c73655d2c226e756d62657273223a5b3333333333333333332e333333333333332c31652b33302c342e352c302e3030322c31652d32375d2c22737472696e67223a22e282ac245c75303030665c6e4127425c225c5c5c5c5c222f227d';
    expect(Buffer.from(canonicalJson(parseJson(input)), 'utf8').toString('hex')).toBe(hex);
  });

  it('sorts the keys of section 3.2.3 by UTF-16 units', () => {
    const input = String.raw`{
      "\u20ac": "Euro Sign",
      "\r": "Carriage Return",
      "\ufb33": "Hebrew Letter Dalet With Dagesh",
      "1": "One",
      "\ud83d\ude00": "Emoji: Grinning Face",
      "\u0080": "Control",
      "\u00f6": "Latin Small Letter O With Diaeresis"
    }`;
    const values = [...canonicalJson(parseJson(input)).matchAll(/:"([^"]*)"/g)].map((found) => found[1]);
    expect(values).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });

  it.each([
    ['0000000000000000', '0'],
    ['8000000000000000', '0'],
    ['0000000000000001', '5e-324'],
    ['8000000000000001', '-5e-324'],
    ['7fefffffffffffff', '1.7976931348623157e+308'],
    ['ffefffffffffffff', '-1.7976931348623157e+308'],
    ['4340000000000000', '9007199254740992'],
    ['c340000000000000', '-9007199254740992'],
    ['4430000000000000', '295147905179352830000'],
    ['44b52d02c7e14af5', '9.999999999999997e+22'],
    ['44b52d02c7e14af6', '1e+23'],
    ['44b52d02c7e14af7', '1.0000000000000001e+23'],
    ['444b1ae4d6e2ef4e', '999999999999999700000'],
    ['444b1ae4d6e2ef4f', '999999999999999900000'],
    ['444b1ae4d6e2ef50', '1e+21'],
    ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'],
    ['3eb0c6f7a0b5ed8d', '0.000001'],
    ['41b3de4355555553', '333333333.3333332'],
    ['41b3de4355555554', '333333333.33333325'],
    ['41b3de4355555555', '333333333.3333333'],
    ['41b3de4355555556', '333333333.3333334'],
    ['41b3de4355555557', '333333333.33333343'],
    ['becbf647612f3696', '-0.0000033333333333333333'],
    ['43143ff3c1cb0959', '1424953923781206.2'],
  ])('writes the number %s of Appendix B as %s', (hex, text) => {
    expect(canonicalJson(fromBits(hex))).toBe(text);
  });

  it('refuses what has no canonical form', () => {
    const reasons: [JsonValue, string][] = [
      [fromBits('7fffffffffffffff'), 'NaN is not allowed'],
      [fromBits('7ff0000000000000'), 'Infinity is not allowed'],
      ['\ud800', 'Lone surrogate is not allowed'],
    ];
    for (const [value, reason] of reasons) {
      expect(refusal(() => canonicalJson(value))).toEqual([
        'not-json',
        undefined,
        `expected plain JSON data, got a value with no canonical form (${reason})`,
      ]);
    }
    expect(refusal(() => canonicalJson(undefined as unknown as JsonValue))[2]).toBe(
      'expected plain JSON data, got undefined; pass null instead',
    );
  });

  it('is a fixed point of reading and writing, whatever the order of the keys', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (raw) => {
        fc.pre(!JSON.stringify(raw).includes('__proto__'));
        const value = raw as JsonValue;
        const text = canonicalJson(value);
        expect(canonicalJson(parseJson(text))).toBe(text);
        expect(canonicalJson(reversed(value))).toBe(text);
      }),
    );
  });
});

/** The same data with the fields of every object in reverse order. */
function reversed(value: JsonValue): JsonValue {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, field]) => [key, reversed(field)]),
  );
}
