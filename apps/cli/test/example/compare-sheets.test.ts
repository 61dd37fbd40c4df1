import { expect, test } from 'vitest';
import type { ConstantDocument } from '@thalweg/format';
import { compareSheets } from '../../src/example/compare-sheets.js';
import { end, row, sheet, UNBOUNDED } from '../render/support/sheets.js';

function changes(before: ConstantDocument, now: ConstantDocument): string[] {
  return compareSheets(sheet([before]), sheet([now])).map(({ end: side, change }) => `${side} ${change}`);
}

const gap = (lower: number | null, upper: number | null, grade: 'certified' | 'observed' = 'certified') =>
  row('gap', lower === null ? null : end(lower, 'l'), upper === null ? null : end(upper, 'u', grade));

test.each<[string, ConstantDocument, ConstantDocument, string[]]>([
  ['the same', gap(1, 2), gap(1, 2), []],
  ['rounding', gap(1, 2), gap(1 + 1e-9, 2 - 1e-9), []],
  ['nothing known on both sides', gap(null, null), gap(null, null), []],
  ['tighter', gap(1, 2), gap(1.2, 1.8), ['lower tighter', 'upper tighter']],
  ['looser', gap(1, 2), gap(0.5, 2.5), ['lower looser', 'upper looser']],
  ['an end lost', gap(1, 2), gap(null, 2), ['lower looser']],
  ['an end found', gap(null, 2), gap(1, 2), ['lower tighter']],
  ['disjoint above', gap(1, 2), gap(2.1, 3), ['lower contradicts', 'upper contradicts']],
  ['disjoint below', gap(1, 2), gap(0, 0.9), ['lower contradicts', 'upper contradicts']],
  ['a search went lower', gap(1, 2, 'observed'), gap(1, 1.5, 'observed'), ['upper tighter']],
  ['a stronger grade', gap(1, 2, 'observed'), gap(1, 2), ['upper stronger-grade']],
  ['a weaker grade', gap(1, 2), gap(1, 2, 'observed'), ['upper weaker-grade']],
  ['unbounded both times', row('be', UNBOUNDED, UNBOUNDED), row('be', UNBOUNDED, UNBOUNDED), []],
  ['no longer unbounded', row('be', UNBOUNDED, null), row('be', end(1, 'l'), null), ['lower tighter']],
])('%s', (_title, before, now, expected) => {
  expect(changes(before, now)).toEqual(expected);
});

test('a difference tells both ends, without their witnesses', () => {
  const witness = { constant: 'gap', value: 2, state: [[1]], observable: null, amplification: 1 } as const;
  const before = row('gap', null, { ...end(2, 'u'), evidence: { ...witness, state: [[1]] } });
  expect(compareSheets(sheet([before]), sheet([gap(null, 1)]))).toEqual([
    { constant: 'gap', end: 'upper', change: 'tighter', recorded: end(2, 'u'), found: end(1, 'u') },
  ]);
});
