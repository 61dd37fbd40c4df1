import { describe, expect, test } from 'vitest';
import { decideClaim } from '../../src/verbs/check/decide.js';
import type { Claim } from '../../src/verbs/option-values.js';
import { end, row, UNBOUNDED } from '../render/support/sheets.js';

const SLACK = 1e-9;

function verdictOf(relation: Claim['relation'], bound: number, constant: ReturnType<typeof row>): string {
  const claim: Claim = { constant: { id: constant.id, mean: null }, relation, bound };
  return decideClaim(claim, constant, SLACK).verdict;
}

const open = row('ge', end(0.25, 'a lift'), end(0.5, 'a search', 'observed'));

describe('a claim', () => {
  test.each([
    ['at-least', 0.2, 'holds'],
    ['at-least', 0.25, 'holds'],
    ['at-least', 0.25 + 1e-10, 'holds'],
    ['at-least', 0.3, 'undecided'],
    ['at-least', 0.5, 'undecided'],
    ['at-least', 0.51, 'refuted'],
    ['at-most', 0.6, 'holds'],
    ['at-most', 0.5, 'holds'],
    ['at-most', 0.3, 'undecided'],
    ['at-most', 0.25, 'undecided'],
    ['at-most', 0.2, 'refuted'],
  ] as const)('%s %d of a constant between 0.25 and 0.5: %s', (relation, bound, verdict) => {
    expect(verdictOf(relation, bound, open)).toBe(verdict);
  });

  test('on a missing end is undecided', () => {
    const unknown = row('t2', null, null);
    expect(verdictOf('at-least', -1e9, unknown)).toBe('undecided');
    expect(verdictOf('at-most', 1e9, unknown)).toBe('undecided');
  });

  test('on a constant that is −∞ is refuted from below and holds from above', () => {
    const cbe = row('cbe', UNBOUNDED, UNBOUNDED);
    expect(verdictOf('at-least', -1e9, cbe)).toBe('refuted');
    expect(verdictOf('at-most', -1e9, cbe)).toBe('holds');
  });

  test('on one that is +∞ the other way round', () => {
    const infinite = { ...UNBOUNDED, unbounded: 'above' as const };
    const gap = row('gap', infinite, infinite);
    expect(verdictOf('at-least', 1e9, gap)).toBe('holds');
    expect(verdictOf('at-most', 1e9, gap)).toBe('refuted');
  });
});
