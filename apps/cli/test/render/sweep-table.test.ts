import type { ConstantDocument, PointDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { pointKey } from '../../src/example/recorded-sheet.js';
import { sweepCsv } from '../../src/render/sweep-csv.js';
import type { SweepResult } from '../../src/render/sweep-result.js';
import { sweepTable } from '../../src/render/sweep-table.js';
import { plain } from './support/layouts.js';
import { end, row, sheet, UNBOUNDED } from './support/sheets.js';

const closed = (id: 'gap' | 'mlsi', value: number) =>
  row(id, end(value, 'l'), end(value, 'u', id === 'mlsi' ? 'observed' : 'certified'), { closed: true });

function point(n: number, constants: ConstantDocument[]): PointDocument {
  return { schema: 'thalweg.point/1', parameters: { n, rate: 1 }, sheet: sheet(constants) };
}

const failed: PointDocument = {
  schema: 'thalweg.point/1',
  parameters: { n: 4, rate: 1 },
  sheet: null,
  error: { code: 'generator-failed', message: 'expected n < 4, got "4"; take less' },
};

const result: SweepResult = {
  sweep: {
    schema: 'thalweg.sweep/1',
    example: { name: 'family', version: '1.2.0', generator: 'a'.repeat(64) },
    constants: [{ id: 'gap' }, { id: 'ge', mean: 'logarithmic' }, { id: 'mlsi' }],
    convention: 'two-alpha',
    seed: 1,
    tool: { name: 'thalweg', version: '0.1.0' },
  },
  points: [
    point(2, [closed('gap', 1), row('ge', end(0.5, 'l'), end(0.75, 'u', 'observed')), closed('mlsi', 1.25)]),
    point(3, [closed('gap', 0.5), row('ge', UNBOUNDED, null), closed('mlsi', 1)]),
    failed,
  ],
  over: ['n'],
  convention: 'two-alpha',
  along: null,
  limits: [],
};

test('closed constants have one column, open ones two; observed ends are marked, failed points told', () => {
  expect(sweepTable(result, plain(100))).toMatchInlineSnapshot(`
    "  family 1.2.0 · rate=1

      n  gap          ge ≥       ge ≤       mlsi
      ──────────────────────────────────────────────────
      2  1.000000000   0.500000  0.750000~  1.250000000~
      3  0.500000000  −∞         —          1.000000000~
      4  —             —         —          —

      convention two-alpha: I ≥ 2αD, so D decays as e^{-2αt} and α ≤ λ
      ~ observed: the lowest value a search met, an upper end only.
      Bounds hold for the models as given, not for a device.
      n=4, rate=1: expected n < 4, got "4"; take less
    "
  `);
});

test('what does not fit goes into a further table', () => {
  const text = sweepTable(result, plain(40));
  expect(text.match(/^ {2}n {2}/gm)).toHaveLength(2);
  const tables = text.slice(0, text.indexOf('convention'));
  expect(Math.max(...tables.split('\n').map((line) => line.length))).toBeLessThanOrEqual(40);
});

test('differences along a parameter, with the distance to a claimed limit', () => {
  const claim = { constant: 'gap', relation: 'tends-to', value: 0.25, along: 'n', source: 's' } as const;
  const limits = [{ claim, others: pointKey({ rate: 1 }) }];
  const sweep = { ...result.sweep, constants: result.sweep.constants.slice(0, 1) };
  const text = sweepTable({ ...result, sweep, along: 'n', limits }, plain());
  expect(text).toMatchInlineSnapshot(`
    "  family 1.2.0 · rate=1

      n  gap          Δgap    gap − limit
      ───────────────────────────────────
      2  1.000000000  —       0.750
      3  0.500000000  −0.500  0.250
      4  —            —       —

      Δ: since the value of n before; of an open bracket its upper end. limit: as
      the author claims it.
      Bounds hold for the models as given, not for a device.
      n=4, rate=1: expected n < 4, got "4"; take less
    "
  `);
  expect(sweepCsv({ ...result, sweep, along: 'n', limits }).split('\n')[2]).toContain(',-0.5,0.25,');
});

test('comma-separated values have all digits, and quotes where a text needs them', () => {
  expect(sweepCsv(result)).toMatchInlineSnapshot(`
    "n,rate,gap_lower,gap_lower_grade,gap_upper,gap_upper_grade,gap_closed,ge_lower,ge_lower_grade,ge_upper,ge_upper_grade,ge_closed,mlsi_lower,mlsi_lower_grade,mlsi_upper,mlsi_upper_grade,mlsi_closed,model,error
    2,1,1,certified,1,certified,true,0.5,certified,0.75,observed,false,1.25,certified,1.25,observed,true,aaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaa,
    3,1,0.5,certified,0.5,certified,true,-inf,certified,,,false,1,certified,1,observed,true,aaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaa,
    4,1,,,,,,,,,,,,,,,,,"expected n < 4, got ""4""; take less"
    "
  `);
});
