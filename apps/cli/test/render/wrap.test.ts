import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { hanging, wrap, wrapPieces } from '../../src/render/wrap.js';

const word = fc.stringMatching(/^[a-zσρ‖≤−=.,]{1,14}$/);
const text = fc.array(word, { minLength: 1, maxLength: 40 }).map((words) => words.join(' '));

describe('wrapping', () => {
  test('keeps every word in order, within the width where words allow it', () => {
    fc.assert(
      fc.property(text, fc.integer({ min: 20, max: 100 }), fc.integer({ min: 0, max: 6 }), (given, width, indent) => {
        for (const lines of [wrap(given, width, indent), hanging('', given, width, indent)]) {
          expect(lines.map((line) => line.trim()).join(' ')).toBe(given);
          for (const line of lines) {
            expect(line.startsWith(' '.repeat(indent))).toBe(true);
            if (line.trim().includes(' ')) expect(line.length).toBeLessThanOrEqual(width);
          }
        }
      }),
    );
  });

  test('breaks pieces only between them, and leaves the separator at the end', () => {
    expect(wrapPieces(['blocks [2]', 'dimension 4', 'primitive'], ' · ', 28, 2)).toEqual([
      '  blocks [2] · dimension 4 ·',
      '  primitive',
    ]);
  });
});

describe('hanging text', () => {
  test('stands beside its label, or below one that leaves no room', () => {
    expect(hanging('  gap', 'one two three four', 19, 8)).toEqual(['  gap   one two', '        three four']);
    expect(hanging('  mixing', 'one two', 19, 6)).toEqual(['  mixing', '      one two']);
  });

  test('keeps relations and single letters together, and lines about equally long', () => {
    expect(hanging('', 'commuting or anticommuting reflections: 4 min c, V² = c', 50, 0)).toEqual([
      'commuting or anticommuting',
      'reflections: 4 min c, V² = c',
    ]);
    expect(hanging('', 'largest K with a ≤ b for all states ρ, observables A', 46, 0)).toEqual([
      'largest K with a ≤ b for',
      'all states ρ, observables A',
    ]);
  });

  test('breaks a formula that is longer than the line', () => {
    expect(hanging('', 'aaaaaaaaa = bbbbbbbbb = ccccccccc', 22, 0)).toEqual(['aaaaaaaaa = bbbbbbbbb', '= ccccccccc']);
  });
});
