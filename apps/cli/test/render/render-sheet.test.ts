import { describe, expect, test } from 'vitest';
import { renderSheet } from '../../src/render/render-sheet.js';
import { bare, coloured, plain } from './support/layouts.js';
import { end, row, sheet, UNBOUNDED } from './support/sheets.js';

const GAP = 'eigenvalue problem on the algebra';
const METRIC = 'the gradient-flow metric needs GNS symmetry; this generator has none';
const constants = [
  row('gap', end(0.7, GAP), end(0.7, GAP), { closed: true }),
  row('ge', end(0.3285873, 'lift of ∂'), end(0.5552104, 'search over states', 'observed')),
  row('ge', null, end(-12.5, 'search over states', 'observed'), { mean: 'left' }),
  row('cbe', UNBOUNDED, UNBOUNDED, { closed: true, note: 'unbounded below' }),
  row('mlsi', end(0.3285873, 'ge ≤ mlsi; lift of ∂'), end(0.7, `mlsi ≤ gap; ${GAP}`)),
  row('t2', null, null, { note: METRIC }),
  row('diameter', null, null, { note: METRIC }),
  row('mixing', end(6.5788, `eigenvector of the gap: ${GAP}`), end(107.96875, `gap: ${GAP}`)),
];

describe('a sheet at 80 columns', () => {
  const text = renderSheet(sheet(constants), plain());

  test('begins with the model and a table aligned on the decimal point, the grade beside each end', () => {
    expect(text.split('\n').slice(0, 14)).toEqual([
      '  A qubit',
      '  blocks [2] · dimension 4 · GNS-symmetric · primitive',
      '  convention two-alpha: I ≥ 2αD, so D decays as e^{-2αt} and α ≤ λ',
      '',
      '  constant       lower end                 upper end',
      '  ──────────────────────────────────────────────────────────────────────────',
      '  gap             0.700000000  certified     0.700000000  certified   closed',
      '  ge              0.328587     certified     0.555211     observed',
      '  ge:left         —                        −12.50000      observed',
      '  cbe            −∞            certified    −∞            certified   closed',
      '  mlsi            0.328587     certified     0.700000     certified',
      '  t2              —                          —',
      '  diameter        —                          —',
      '  mixing(0.01)    6.578800     certified   107.9688       certified',
    ]);
  });

  test('tells what a constant means and how its ends are known, chains cut where they reach another row', () => {
    expect(text).toContain(
      [
        '  mlsi          largest α with I(ρ) ≥ 2α D(ρ‖E†ρ) for all',
        '                states ρ, I(ρ) = −Tr L†ρ(log ρ − log σ)',
        '                lower end: ge ≤ mlsi',
        '                upper end: mlsi ≤ gap',
        '',
      ].join('\n'),
    );
    expect(text).toContain('                both ends: eigenvalue problem on the algebra\n');
    expect(text).toContain('                both ends: an eigenvalue problem\n                note: unbounded below\n');
  });

  test('names constants without any end by the reason, once', () => {
    expect(text).toMatch(
      /\n {2}Not given\n {4}t2, diameter: the gradient-flow metric\s+needs GNS symmetry; this generator has none\n\n/,
    );
    expect(text).not.toContain('  t2            largest');
  });

  test('explains the grades it shows, and no others', () => {
    expect(text).toContain('  Certified: floating point, its error margin inside the digits shown.\n  Observed: ');
    expect(text).not.toMatch(/Exact|Enclosed/);
  });

  test('has no line above 80 columns and no blank at the end of one', () => {
    for (const line of text.split('\n')) {
      expect(line.length, line).toBeLessThanOrEqual(80);
      expect(line).toBe(line.trimEnd());
    }
  });
});

describe('a sheet elsewhere', () => {
  test('at 60 and 40 columns puts each end on a line of its own', () => {
    for (const width of [60, 40]) {
      const text = renderSheet(sheet(constants), plain(width));
      expect(text).toContain(
        '  gap  closed\n    lower    0.700000000  certified\n    upper    0.700000000  certified\n',
      );
      expect(text).toContain(
        '  mixing(0.01)\n    lower    6.578800     certified\n    upper  107.9688       certified\n',
      );
      for (const line of text.split('\n')) expect(line.length, line).toBeLessThanOrEqual(width);
    }
  });

  test('on a wide terminal sets no prose wider than 100 columns', () => {
    const lines = renderSheet(sheet(constants), plain(200)).split('\n');
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(100);
  });

  test('with colours says the same', () => {
    expect(renderSheet(sheet(constants), coloured())).toContain('\u001b[');
    expect(bare(renderSheet(sheet(constants), coloured()))).toBe(renderSheet(sheet(constants), plain()));
  });

  test('of a slow model keeps the digits, in a unit that it names', () => {
    const slow = [row('gap', end(2e-9, GAP, 'certified', 1e-24), end(2e-9, GAP, 'certified', 1e-24), { closed: true })];
    const text = renderSheet(sheet(slow), plain());
    expect(text).toContain('  rates in units of 10^−8, times of 10^8, lengths of 10^4\n');
    expect(text).toContain('  gap        0.200000000  certified   0.200000000  certified   closed\n');
  });

  test('without entropy constants needs no convention', () => {
    expect(renderSheet(sheet(constants.slice(0, 2)), plain())).not.toContain('convention');
  });

  test('shortens a long list of blocks', () => {
    const blocks = Array.from({ length: 12 }, () => 1);
    const text = renderSheet(sheet(constants, { blocks, dimension: 12 }), plain());
    expect(text).toContain('blocks [1,1,1,1,…] (12 of them) · dimension 12');
  });
});
