import { describe, expect, it } from 'vitest';
import { encodeEnd, endValue, parseSheet, type EndDocument } from '../../src/index.js';

const end = (fields: Partial<EndDocument>): EndDocument => ({
  value: null,
  grade: 'certified',
  by: 'unbounded',
  note: 'a rule',
  ...fields,
});

describe('the value of an end', () => {
  it('survives being written, infinities with their sign', () => {
    for (const value of [-Infinity, -2.5, 0, 1, Infinity]) {
      for (const constant of ['gap', 'cbe', 'diameter', 'mixing'] as const) {
        expect(endValue(constant, encodeEnd({ value, grade: 'certified', by: 'a rule' }))).toBe(value);
      }
    }
  });

  it('is −∞ for a rate and +∞ for a length or time where the document does not say', () => {
    expect(endValue('cge', end({}))).toBe(-Infinity);
    expect(endValue('diameter', end({}))).toBe(Infinity);
    expect(endValue('mixing', end({}))).toBe(Infinity);
  });

  it('is refused where a direction stands beside a number', () => {
    const sheet = (lower: unknown): string =>
      JSON.stringify({
        schema: 'thalweg.sheet/1',
        model: { digest: 'a'.repeat(64), dimension: 4, blocks: [2], symmetry: 'none', primitive: null },
        convention: 'two-alpha',
        constants: [{ id: 'gap', lower, upper: null, closed: false, definition: 'a definition' }],
        seed: 1,
        tool: { name: 'thalweg', version: '0' },
      });
    expect(parseSheet(sheet(end({ unbounded: 'above' }))).constants[0]?.lower).toMatchObject({ unbounded: 'above' });
    expect(() => parseSheet(sheet(end({ value: 1, by: 'a rule', unbounded: 'above' })))).toThrow(
      'expected no "unbounded" beside the value 1, got "above"; remove it',
    );
  });
});
