import { describe, expect, it } from 'vitest';
import { CONVENTION_NAMES, conventionOf, convert, definitionOf } from '../../src/constants/conventions.js';
import { CONSTANT_IDS } from '../../src/sheet/bracket.js';

describe('conventions', () => {
  it('halves and doubles the entropy constants and leaves the others', () => {
    expect(convert(0.6, 'mlsi', 'two-alpha')).toBe(0.6);
    expect(convert(0.6, 'clsi', 'four-alpha')).toBe(0.3);
    expect(convert(0.6, 'lsi', 'one-alpha')).toBe(1.2);
    for (const id of ['gap', 'ge', 'cge', 'be', 'cbe', 't2', 'diameter', 'mixing'] as const) {
      for (const name of CONVENTION_NAMES) expect(convert(0.6, id, name)).toBe(0.6);
    }
  });

  it('keeps lsi ≤ mlsi ≤ a multiple of the gap in each: the multiple is the factor', () => {
    expect(CONVENTION_NAMES.map((name) => conventionOf(name).factor)).toEqual([1, 0.5, 2]);
    expect(CONVENTION_NAMES.map((name) => conventionOf(name).summary)).toEqual([
      'I ≥ 2αD, so D decays as e^{-2αt} and α ≤ λ',
      'I ≥ 4αD, so D decays as e^{-4αt} and α ≤ λ/2',
      'I ≥ αD, so D decays as e^{-αt} and α ≤ 2λ',
    ]);
  });

  it('defines every constant in every convention, the entropy constants differently', () => {
    for (const id of CONSTANT_IDS) {
      const texts = CONVENTION_NAMES.map((name) => definitionOf(id, name));
      for (const text of texts) expect(text).toMatch(/^(largest|least) /);
      expect(new Set(texts).size).toBe(['mlsi', 'clsi', 'lsi'].includes(id) ? 3 : 1);
      expect(definitionOf(id)).toBe(texts[0]);
    }
    expect(definitionOf('mlsi', 'four-alpha')).toContain('I(ρ) ≥ 4α D(ρ‖E†ρ)');
    expect(definitionOf('lsi', 'four-alpha')).toContain('≥ α D(ρ‖σ)');
  });

  it('names the conventions there are when one is unknown', () => {
    expect(() => conventionOf('three-alpha')).toThrowError(/two-alpha, four-alpha, one-alpha, got "three-alpha"/);
  });
});
