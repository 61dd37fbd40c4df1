import type { PointDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { pointKey } from '../../src/example/recorded-sheet.js';
import { differencesOf } from '../../src/sweep/differences.js';
import { end, row, sheet } from '../render/support/sheets.js';

function point(n: number, kind: string, value: number | null): PointDocument {
  const gap = value === null ? null : end(value, 'eigenvalue problem');
  return {
    schema: 'thalweg.point/1',
    parameters: { n, kind },
    sheet: sheet([row('mlsi', gap, gap, { closed: true })]),
  };
}

const points = [
  point(2, 'a', 1),
  point(2, 'b', 5),
  point(3, 'a', 1.5),
  point(3, 'b', null),
  point(4, 'a', 1.75),
  point(4, 'b', 6),
];
const rowOf = ({ sheet: found }: PointDocument) => found?.constants[0];

test('differences follow one parameter, all others the same', () => {
  const found = differencesOf({ points, along: 'n', limits: [], convention: 'two-alpha' }, rowOf);
  expect(found.map(({ toPrevious }) => toPrevious)).toEqual([null, null, 0.5, null, 0.25, 1]);
  expect(found.map(({ toLimit }) => toLimit)).toEqual([null, null, null, null, null, null]);
});

test('a limit is compared in the convention of the sweep, where it belongs', () => {
  const claim = {
    constant: 'mlsi',
    relation: 'tends-to',
    value: 4,
    along: 'n',
    source: 's',
    convention: 'one-alpha',
  } as const;
  const limits = [{ claim, others: pointKey({ kind: 'a' }) }];
  const found = differencesOf({ points, along: 'n', limits, convention: 'two-alpha' }, rowOf);
  expect(found.map(({ toLimit }) => toLimit)).toEqual([-1, null, -0.5, null, -0.25, null]);
});

test('of an open bracket the upper end is taken, or the lower one where there is no upper', () => {
  const open = (lower: number | null, upper: number | null): PointDocument => ({
    schema: 'thalweg.point/1',
    parameters: { n: lower ?? 0 },
    sheet: sheet([row('gap', lower === null ? null : end(lower, 'l'), upper === null ? null : end(upper, 'u'))]),
  });
  const found = differencesOf(
    { points: [open(1, 2), open(2, null), open(3, 4)], along: 'n', limits: [], convention: 'two-alpha' },
    rowOf,
  );
  expect(found.map(({ toPrevious }) => toPrevious)).toEqual([null, 0, 2]);
});
