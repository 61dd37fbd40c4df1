import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import { displacements } from '../../src/cells/cell.js';
import type { Cell } from '../../src/cells/cell.js';
import type { CellForms } from '../../src/cells/cell-forms.js';
import { proveOverCells } from '../../src/cells/branch-and-bound.js';
import { chainForms } from '../../src/cells/chain-forms.js';
import { chainRates } from '../../src/cells/chain-rates.js';
import { inverseFactor, isPositiveDefinite, meanValueMatrix } from '../../src/cells/definite.js';
import { qubitAxes } from '../../src/cells/qubit-axes.js';
import { tracialQubitForms } from '../../src/cells/tracial-qubit-forms.js';
import { type Interval, point } from '../../src/checker/arithmetic/interval.js';
import { pauliJumps } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { curvaturePencil } from '../../src/metric/curvature-pencil.js';
import { metricModel } from '../../src/metric/metric-model.js';
import type { StateFrame } from '../../src/metric/state-frame.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import type { FixedPoints } from '../../src/structure/fixed-points.js';
import { analyse } from '../../src/structure/structure.js';
import { fromEntries } from '../../src/linalg/complex-matrix.js';

/** κ(ρ) of the ordinary pencil, which shares no code with the cells. */
function kappaAt(g: Generator, frame: StateFrame): number {
  const { canonical, fixedPoints } = analyse(g);
  const model = metricModel(canonical as CanonicalForm, fixedPoints as FixedPoints);
  return curvaturePencil(model, 'logarithmic').at(frame).kappa;
}

const unit = fc.double({ min: 0, max: 1, noNaN: true });

const chain = fc.tuple(fc.array(unit, { minLength: 6, maxLength: 6 }), fc.integer({ min: 2, max: 3 })).map(([x, n]) => {
  const pi = x.map((value) => 0.2 + value);
  return Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, j) => (i === j ? 0 : (0.1 + x[3 + ((i + j) % 3)]) / pi[i])),
  );
});

const pauli = fc.tuple(unit, unit, unit).map(([a, b, c]) => [0.1 + a / 4, 0.5 + b / 4, 1 + c / 4] as const);

/** Chain, its forms in the given order of points, and the state of the parameters y. */
function ordinaryChain(rates: number[][], y: readonly number[]): { forms: CellForms; kappa: number } {
  const g = ratesGenerator(rates);
  const lambda = new Float64Array(rates.length);
  lambda[0] = 1;
  y.forEach((step, k) => (lambda[k + 1] = lambda[k] * Math.exp(-step)));
  const forms = chainForms(chainRates(g) as Interval[][]);
  return { forms, kappa: kappaAt(g, { lambda, u: null }) };
}

/** Pauli jumps with C = diag(c), and the state with log-ratio y and the axis of (s,t). */
function ordinaryQubit(c: readonly [number, number, number], [y, s, t]: readonly number[]) {
  const g = pauliJumps(['X', 'Y', 'Z'].map((string, k) => ({ string, rate: c[k] })));
  const d = 1 + s * s + t * t;
  const [x1, x2, x3] = [(2 * s) / d, (2 * t) / d, (1 - s * s - t * t) / d];
  const r = Math.tanh(y / 2);
  const rho = fromEntries(2, 2, (i, j) =>
    i === j ? [(1 + (i === 0 ? r : -r) * x3) / 2, 0] : [(r * x1) / 2, ((i < j ? -1 : 1) * r * x2) / 2],
  );
  const structure = analyse(g);
  const { values, vectors } = blockEigen(structure.algebra, rho);
  const axes = qubitAxes(structure.canonical as CanonicalForm);
  if (axes?.angles !== 2) throw new Error('expected three different axes');
  return { forms: tracialQubitForms(axes.body, 2), kappa: kappaAt(g, { lambda: values, u: vectors }) };
}

function expectThreshold(forms: CellForms, at: readonly number[], kappa: number): void {
  const cell: Cell = at.map(point);
  const slack = 1e-6 * (1 + Math.abs(kappa));
  expect(isPositiveDefinite(forms.at(cell, kappa - slack).below, forms.side), `below ${kappa}`).toBe(true);
  expect(inverseFactor(forms.at(cell, kappa + slack).jets, forms.side), `above ${kappa}`).toBeNull();
}

describe('the forms at one state change sign at κ(ρ)', () => {
  it('of the pencil of a chain', () => {
    fc.assert(
      fc.property(
        chain,
        fc.array(fc.double({ min: 0, max: 6, noNaN: true }), { minLength: 2, maxLength: 2 }),
        (rates, y) => {
          const at = y.slice(0, rates.length - 1);
          const { forms, kappa } = ordinaryChain(rates, at);
          expectThreshold(forms, at, kappa);
        },
      ),
    );
  });

  it('of the pencil of a qubit', () => {
    fc.assert(
      fc.property(pauli, fc.tuple(fc.double({ min: 0.01, max: 6, noNaN: true }), unit, unit), (c, at) => {
        const { forms, kappa } = ordinaryQubit(c, at);
        expectThreshold(forms, at, kappa);
      }),
    );
  });
});

/** A cell around a point and another point in it. */
const boxes = fc.array(fc.tuple(unit, unit, unit, fc.integer({ min: 0, max: 8 })), { minLength: 3, maxLength: 3 });

function boxOf([at, left, right, size]: readonly [number, number, number, number], scale: number) {
  const centre = scale * at;
  const width = scale * 2 ** -size;
  return { range: { lo: Math.max(0, centre - left * width), hi: centre + right * width }, inside: centre };
}

/** What the forms say about a cell holds at a state inside it, and no single cell accepts a rate above κ there. */
function expectSound(forms: CellForms, cell: Cell, inside: readonly number[], kappa: number): void {
  const above = kappa + 1e-6 * (1 + Math.abs(kappa));
  expect(proveOverCells({ ...forms, root: cell }, above, { maxCells: 1 }).proved).toBe(false);
  const open = cell
    .map(({ lo }) => ({ lo, hi: Infinity }))
    .map((range, l) => (forms.root[l].hi < Infinity ? cell[l] : range));
  expect(proveOverCells({ ...forms, root: open }, above, { maxCells: 1 }).proved).toBe(false);
  const n = forms.side;
  const whole = forms.at(cell, kappa);
  const factor = whole.exact ? inverseFactor(whole.jets, n) : null;
  if (!factor) return;
  const thin = forms.at(inside.map(point), kappa);
  const around = meanValueMatrix(whole.jets, n, factor, displacements(cell));
  const here = meanValueMatrix(thin.jets, n, factor, displacements(inside.map(point)));
  for (let i = 0; i < n; i++) {
    for (let j = i; j < n; j++) {
      expect(overlap(whole.jets[i * n + j].range, thin.jets[i * n + j].range), `entry ${i}, ${j}`).toBe(true);
      expect(overlap(around.entries[i * n + j], here.entries[i * n + j]), `mean value of entry ${i}, ${j}`).toBe(true);
    }
  }
}

function overlap(x: Interval, y: Interval): boolean {
  return x.lo <= y.hi && y.lo <= x.hi;
}

describe('the forms over a cell hold at the states inside it', () => {
  it('for chains', () => {
    fc.assert(
      fc.property(chain, boxes, (rates, parts) => {
        const used = parts.slice(0, rates.length - 1).map((part) => boxOf(part, 6));
        const inside = used.map((part) => part.inside);
        const { forms, kappa } = ordinaryChain(rates, inside);
        expectSound(
          forms,
          used.map(({ range }) => range),
          inside,
          kappa,
        );
      }),
      { numRuns: 100 },
    );
  });

  it('for qubits', () => {
    fc.assert(
      fc.property(pauli, boxes, (c, parts) => {
        const used = parts.map((part, k) => boxOf(part, k === 0 ? 6 : 1));
        const inside = used.map((part) => part.inside);
        const { forms, kappa } = ordinaryQubit(c, inside);
        expectSound(
          forms,
          used.map(({ range }) => range),
          inside,
          kappa,
        );
      }),
      { numRuns: 100 },
    );
  });
});
