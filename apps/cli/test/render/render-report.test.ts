import { reportSchema, type ReportDocument } from '@thalweg/format';
import { describe, expect, test } from 'vitest';
import { renderReport } from '../../src/render/render-report.js';
import { bare, coloured, plain } from './support/layouts.js';

const GOOD = { holds: true, residual: 0 };

function report(more: Partial<ReportDocument> = {}): ReportDocument {
  return reportSchema.parse({
    schema: 'thalweg.report/1',
    model: { title: 'A qubit', digest: 'd'.repeat(64), dimension: 4, blocks: [2], symmetry: 'gns', primitive: true },
    markov: {
      hermitian: GOOD,
      unital: { holds: true, residual: 1.26e-17 },
      completelyPositive: { holds: true, smallestEigenvalue: -2.3e-17 },
    },
    symmetry: { kind: 'gns', residuals: { tracial: 0.499, gns: 0, kms: 0 } },
    state: [
      [0.731058, 0],
      [0, 0.268942],
    ],
    fixedPoints: { dimension: 1, blocks: [1] },
    primitive: true,
    jumps: [
      { label: 'down', frequency: -1, norm: 0.470855 },
      { label: 'up', frequency: 1, norm: 0.470855 },
    ],
    canonicalResidual: 2e-16,
    spectrum: [0, 0.5, 0.5, 1],
    tool: { name: 'thalweg', version: '0' },
    ...more,
  });
}

describe('a report', () => {
  test('of a GNS-symmetric qubit', () => {
    expect(renderReport(report(), plain())).toBe(
      [
        '  A qubit',
        '  blocks [2] · dimension 4 · GNS-symmetric · primitive',
        '',
        '  Markov semigroup       yes',
        '    L(A*) = L(A)*        yes, residual 0',
        '    L(1) = 0             yes, residual 1.3e−17',
        '    completely positive  yes, smallest eigenvalue of the projected',
        '                         Choi matrix −2.3e−17, rounding of 0',
        '',
        '  Symmetry               GNS',
        '    for the trace        no, residual 0.499',
        '    GNS                  yes, residual 0',
        '    KMS                  yes, residual 0',
        '  Fixed points           multiples of 1: primitive',
        '  Invariant state σ      diagonal 0.731058, 0.268942',
        '  Canonical form         2 jumps, from which L is rebuilt with residual 2.0e−16',
        '    jump   frequency ω   norm ‖V‖',
        '    down   −1.000000     0.470855',
        '    up      1.000000     0.470855',
        '',
        '  Spectrum of −L',
        '    0  0.500000 (×2)  1.000000',
        '',
        `  digest ${'d'.repeat(64)}`,
        '',
      ].join('\n'),
    );
  });

  test('of a generator that is no Markov semigroup says which condition fails, and no more', () => {
    const markov = {
      ...report().markov,
      completelyPositive: { holds: false, smallestEigenvalue: -1 },
    };
    const empty = { state: null, fixedPoints: null, primitive: null, jumps: null, spectrum: null };
    const text = renderReport(
      report({ markov, symmetry: { kind: 'none', residuals: {} }, notes: ['said already'], ...empty }),
      plain(),
    );
    expect(text).toContain('  Markov semigroup       no\n');
    expect(text).toMatch(/completely positive {2}no, smallest eigenvalue of the\s+projected Choi matrix −1\.00\n/);
    expect(text).not.toMatch(/Symmetry|Canonical|said already/);
  });

  test('without symmetry shows the state, conjugate pairs as one, and the notes', () => {
    const text = renderReport(
      report({
        symmetry: { kind: 'none', residuals: { tracial: 1.37, gns: 1.37, kms: 1.35 } },
        jumps: null,
        state: {
          re: [
            [0.75, 0],
            [0, 0.25],
          ],
          im: [
            [0, 0.25],
            [-0.25, 0],
          ],
        },
        spectrum: [0, [0.75, -0.5], [0.75, 0.5], 1.5],
        notes: ['The Hamiltonian breaks the symmetry.'],
      }),
      plain(),
    );
    expect(text).toContain('  Symmetry               none\n    for the trace        no, residual 1.37\n');
    expect(text).toContain('  Invariant state σ\n    0.750000               0        + 0.250000i\n');
    expect(text).toContain('  Canonical form         none: it needs GNS symmetry\n');
    expect(text).toContain('    0  0.750000 ± 0.500000i  1.500000\n\n  The Hamiltonian breaks the symmetry.\n');
  });

  test('of a model without a faithful invariant state', () => {
    const text = renderReport(
      report({ symmetry: { kind: 'none', residuals: {} }, primitive: false, jumps: null }),
      plain(),
    );
    expect(text).toContain('  Symmetry               not defined without a faithful invariant state\n');
    expect(text).toMatch(/Fixed points +multiples of 1, but the invariant\s+state is not faithful: not primitive\n/);
  });

  test('of large models says what --json has', () => {
    const n = 40;
    const values = Array.from({ length: n }, (_, k) => k);
    const state = values.map((i) => values.map((j) => (i === j ? 1 / n : 0)));
    const jumps = values.map((k) => ({ label: `V${k}`, frequency: 0, norm: 1 }));
    const markov = {
      ...report().markov,
      completelyPositive: { holds: true, smallestEigenvalue: 0, byForm: true },
    };
    const fixedPoints = { dimension: 2, blocks: [1, 1] };
    const text = renderReport(
      report({ state, jumps, spectrum: values, markov, fixedPoints, primitive: false }),
      plain(),
    );
    expect(text).toContain('    … 40 in all, listed by --json\n');
    expect(text).toMatch(/… 40 in all, listed by --json\n\n {2}digest/);
    expect(text).toContain('… (40 entries, given by --json)');
    expect(text).toContain('yes, by its jumps, with rates of at least 0\n');
    expect(text).toMatch(/Fixed points +an algebra of dimension 2 with\s+blocks \[1,1\]: not primitive\n/);
  });

  test('fits the terminal, narrow or not, and says the same in colours', () => {
    for (const width of [40, 60, 80, 120]) {
      const digest = `  ${'d'.repeat(64)}`;
      for (const line of renderReport(report(), plain(width)).split('\n')) {
        if (line !== digest) expect(line.length, line).toBeLessThanOrEqual(width);
      }
    }
    expect(bare(renderReport(report(), coloured()))).toBe(renderReport(report(), plain()));
    expect(renderReport(report(), coloured())).toContain('\u001b[31mno\u001b');
  });
});
