import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parseReport, type ReportDocument } from '@thalweg/format';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';
import { startThalweg } from '../helpers/thalweg.js';

/** A folder with the matrix files that models name. */
let folder: string;

beforeAll(async () => {
  await ensureBundle();
  folder = mkdtempSync(join(tmpdir(), 'thalweg-forms-'));
  writeFileSync(join(folder, 'flip.mtx'), '%%MatrixMarket matrix coordinate real symmetric\n2 2 1\n2 1 1\n');
  writeFileSync(join(folder, 'flip.npy'), flipNpy());
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

const DEPOLARISING = { algebra: [2], generator: { form: 'expectation', onto: { scalars: true } } };
const FLIP = [[0, 1], [1, 0]]; // prettier-ignore
const RAISE = [[0, 0], [1, 0]]; // prettier-ignore
const LOWER = [[0, 1], [0, 0]]; // prettier-ignore
const E = Math.exp(1);

interface Expected {
  readonly kind: ReportDocument['symmetry']['kind'];
  readonly primitive: boolean;
  readonly blocks: readonly number[];
  /** Eigenvalues of −L. */
  readonly spectrum: readonly number[];
}

/** Every form of a generator, with what is known of it. */
const FORMS: readonly (readonly [name: string, model: object, expected: Expected])[] = [
  [
    'lindblad',
    { algebra: [2], generator: { form: 'lindblad', jumps: [{ matrix: FLIP, rate: 0.5 }] } },
    { kind: 'tracial', primitive: false, blocks: [2], spectrum: [0, 0, 1, 1] },
  ],
  [
    'balanced',
    {
      algebra: [2],
      generator: {
        form: 'balanced',
        state: [[E / (1 + E), 0], [0, 1 / (1 + E)]],
        terms: [{ matrix: LOWER, frequency: -1 }, { matrix: RAISE, frequency: 1 }],
      },
    }, // prettier-ignore
    {
      kind: 'gns',
      primitive: true,
      blocks: [2],
      spectrum: [0, 2 * Math.cosh(0.5), 2 * Math.cosh(0.5), 4 * Math.cosh(0.5)],
    },
  ],
  [
    'rates',
    { generator: { form: 'rates', rates: [[0, 1], [2, 0]] } }, // prettier-ignore
    { kind: 'gns', primitive: true, blocks: [1, 1], spectrum: [0, 3] },
  ],
  [
    'expectation onto the scalars',
    DEPOLARISING,
    { kind: 'tracial', primitive: true, blocks: [2], spectrum: [0, 1, 1, 1] },
  ],
  [
    'expectation onto the diagonal',
    { algebra: [2], generator: { form: 'expectation', onto: { diagonal: true }, rate: 3 } },
    { kind: 'tracial', primitive: false, blocks: [2], spectrum: [0, 0, 3, 3] },
  ],
  [
    'expectation onto a span',
    { algebra: [2], generator: { form: 'expectation', onto: { spannedBy: [{ pauli: 'I' }, { pauli: 'X' }] } } },
    { kind: 'tracial', primitive: false, blocks: [2], spectrum: [0, 0, 1, 1] },
  ],
  [
    'length on a cyclic group',
    { generator: { form: 'length', group: { cyclic: 4 }, length: 'word' } },
    { kind: 'tracial', primitive: true, blocks: [1, 1, 1, 1], spectrum: [0, 1, 1, 2] },
  ],
  [
    'length on a symmetric group',
    { generator: { form: 'length', group: { symmetric: 3 }, length: 'word' } },
    { kind: 'gns', primitive: true, blocks: [1, 1, 2], spectrum: [0, 1, 1, 2, 2, 3] },
  ],
  [
    'schur',
    { generator: { form: 'schur', points: [[0], [1]] } },
    { kind: 'tracial', primitive: false, blocks: [2], spectrum: [0, 0, 1, 1] },
  ],
  [
    'davies',
    {
      algebra: [2],
      generator: {
        form: 'davies',
        hamiltonian: [[0, 0], [0, 1]],
        couplings: [FLIP],
        beta: 1,
        spectrum: { kind: 'flat', strength: 1 },
      },
    }, // prettier-ignore
    { kind: 'gns', primitive: true, blocks: [2], spectrum: [0, 0.5, 0.5, 1] },
  ],
  [
    'superoperator from a NumPy file, Schrödinger picture',
    {
      algebra: [2],
      generator: { form: 'superoperator', picture: 'schrodinger', stacking: 'columns', matrix: { file: 'flip.npy' } },
    },
    { kind: 'tracial', primitive: false, blocks: [2], spectrum: [0, 0, 2, 2] },
  ],
  [
    'lindblad from a Matrix Market file, with a declared state',
    {
      algebra: [2],
      state: { pauli: { I: 0.5 } },
      generator: { form: 'lindblad', jumps: [{ matrix: { file: 'flip.mtx' } }, { matrix: { pauli: 'Z' } }] },
    },
    { kind: 'tracial', primitive: true, blocks: [2], spectrum: [0, 2, 2, 4] },
  ],
  [
    'sum',
    {
      algebra: [2],
      generator: {
        form: 'sum',
        terms: [
          { weight: 0.5, generator: DEPOLARISING.generator },
          { weight: 2, generator: { form: 'expectation', onto: { diagonal: true } } },
        ],
      },
    },
    { kind: 'tracial', primitive: true, blocks: [2], spectrum: [0, 0.5, 2.5, 2.5] },
  ],
  [
    'tensor',
    { generator: { form: 'tensor', factors: [DEPOLARISING, { generator: { form: 'rates', rates: [[0, 1], [2, 0]] } }] } }, // prettier-ignore
    { kind: 'gns', primitive: true, blocks: [2, 2], spectrum: [0, 1, 1, 1, 3, 4, 4, 4] },
  ],
];

describe('inspect reads from standard input every form of a generator', () => {
  test.each(FORMS)('%s', async (_, model, expected) => {
    const input = JSON.stringify({ schema: 'thalweg.model/1', ...model });
    const { exitCode, stdout, stderr } = await startThalweg(['inspect', '-', '--json'], { cwd: folder, input });
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    const report = parseReport(String(stdout));
    const { blocks, symmetry, primitive } = report.model;
    expect({ blocks, kind: symmetry, primitive }).toEqual({
      blocks: expected.blocks,
      kind: expected.kind,
      primitive: expected.primitive,
    });
    expect(report).toMatchObject({ primitive, symmetry: { kind: symmetry } });
    expect(report.spectrum).toHaveLength(expected.spectrum.length);
    expected.spectrum.forEach((value, k) => expect(report.spectrum?.[k], `eigenvalue ${k}`).toBeCloseTo(value, 10));
    expect(report.canonicalResidual).toBeLessThan(1e-11);
    for (const jump of report.jumps ?? []) expect(jump.matrix).toBeDefined();
  });
});

/** ρ ↦ XρX − ρ on stacked columns, as a NumPy file of doubles. */
function flipNpy(): Uint8Array {
  const header = "{'descr': '<f8', 'fortran_order': False, 'shape': (4, 4), }";
  const bytes = Buffer.alloc(128 + 16 * 8, ' ');
  bytes.write('\x93NUMPY\x01\x00', 'latin1');
  bytes.writeUInt16LE(118, 8);
  bytes.write(header, 10, 'latin1');
  bytes.write('\n', 127, 'latin1');
  for (let row = 0; row < 4; row++) {
    for (let column = 0; column < 4; column++) {
      const value = row === column ? -1 : row + column === 3 ? 1 : 0;
      bytes.writeDoubleLE(value, 128 + 8 * (4 * row + column));
    }
  }
  return bytes;
}
