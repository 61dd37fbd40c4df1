import { type Interval, ONE, ZERO, add, mul, neg, point, sub } from '../checker/arithmetic/interval.js';
import { type Cell, coordinateJets, isBounded } from './cell.js';
import type { CellForms, FormsOnCell } from './cell-forms.js';
import { type ExpTable, expTable } from './exp-table.js';
import {
  type Jet,
  addJet,
  constantJet,
  expDifferenceJet,
  loweredJet,
  mulJet,
  negJet,
  positiveJet,
  reciprocalJet,
  scaleJet,
  squareJet,
  subJet,
} from './jet.js';

/** Symmetric 3×3 matrices, row-major. */
export type Symmetric3<T> = readonly T[];

/**
 * The form of a qubit with tracial symmetry. On Bloch vectors, with V_j = v_j·σ and C = Re Σ v_jv_j*, L acts as ℓ = 4(C − Tr C) and
 * [V_j,A] = 2i(v_j×a)·σ. At a state with eigenvalues 1, τ = e^{−y} and axis n the metric is 4 Σ (v_j×a)*T(v_j×a),
 * T = 2F + (S−2F)nn*, F = Λ(1,τ), S = 1+τ, and along the flow T moves by
 *     −2(n*ℓn)P(1 − nn*) + (S−2F)(mn* + nm*),   P = ½(1−τ)(Λ₂−Λ₁) ≥ 0,   m = ℓn − (n*ℓn)n.
 * A quarter of the form is given, in the axes in which C = `body`; n is e_z turned by half a turn about (s,t,1). With `angles` 0 it is
 * e_z itself (C is a multiple of 1 within its intervals), with 1 it stays in the plane of the first and third axes (C is symmetric
 * about the third within its intervals), with 2 it runs over an octant and a little more (C is diagonal). The opposite axis gives the
 * same form. P tends to ∞ with y and counts with its lower end.
 */
export function tracialQubitForms(body: Symmetric3<Interval>, angles: 0 | 1 | 2): CellForms {
  const root = [{ lo: 0, hi: Infinity }, ...new Array<Interval>(angles).fill({ lo: 0, hi: 1 })];
  const trace = add(add(body[0], body[4]), body[8]);
  const model: QubitModel = {
    c: body,
    table: expTable(),
    l: body.map((x, at) => mul(FOUR, at % 4 === 0 ? sub(x, trace) : x)),
    whole: body.map((x, at) => (at % 4 === 0 ? sub(trace, x) : neg(x))),
  };
  return { side: 3, root, at: (cell, k) => evaluate(model, cell, k) };
}

interface QubitModel {
  readonly table: ExpTable;
  readonly c: Symmetric3<Interval>;
  readonly l: Symmetric3<Interval>;
  /** Σ [v_j]*[v_j] = Tr C − C. */
  readonly whole: Symmetric3<Interval>;
}

function evaluate({ c, l, whole, table }: QubitModel, cell: Cell, k: number): FormsOnCell {
  const [y, ...turn] = coordinateJets(cell);
  const parameters = y.slopes.length;
  const zero = constantJet(ZERO, parameters);
  const { mean, excess, growth } = functionsOf(table, y);
  const n = axisOf(turn, parameters);
  const ln = n.map((_, i) => n.map((x, j) => scaleJet(x, l[3 * i + j])).reduce(addJet));
  const rate = n.map((x, i) => mulJet(x, ln[i])).reduce(addJet);
  const m = n.map((x, i) => subJet(ln[i], mulJet(rate, x)));
  const along = mixed(squareOf(n, n), c);
  const moved = mixed(squareOf(m, n), c);
  const metric = along.map((x, at) => addJet(scaleJet(mean, mul(TWO, whole[at])), mulJet(excess, x)));
  const image = timesConstant(metric, l);
  const speed = positiveJet(mulJet(growth, negJet(rate)));
  const lowered = loweredJet(speed);
  const below = new Array<Interval>(9).fill(ZERO);
  const jets = new Array<Jet>(9).fill(zero);
  for (let p = 0; p < 3; p++) {
    for (let q = p; q < 3; q++) {
      const at = 3 * p + q;
      const drift = scaleJet(addJet(image[at], image[3 * q + p]), HALF);
      const turning = mulJet(excess, scaleJet(moved[at], HALF));
      const rest = subJet(subJet(turning, drift), scaleJet(metric[at], point(k)));
      const across = subJet(constantJet(whole[at], parameters), along[at]);
      below[at] = add(rest.range, mul(point(speed.range.lo), across.range));
      jets[at] = addJet(rest, mulJet(lowered.jet, across));
    }
  }
  return { below, jets, exact: lowered.exact && cell.every(isBounded) };
}

const HALF = point(0.5);
const TWO = point(2);
const FOUR = point(4);

/** F = exp[0,−y], S − 2F = 1 + e^{−y} − 2F, between 0 and 1, and P = ½(1 − e^{−y})(exp[0,0,y] − exp[0,0,−y]). */
function functionsOf(table: ExpTable, y: Jet): { mean: Jet; excess: Jet; growth: Jet } {
  const one = constantJet(ONE, y.slopes.length);
  const minus = negJet(y);
  const tau = expDifferenceJet(table, 0, 1, minus);
  const mean = expDifferenceJet(table, 1, 1, minus);
  const plain = subJet(addJet(one, tau), scaleJet(mean, TWO));
  const excess = { ...plain, range: { lo: Math.max(0, plain.range.lo), hi: Math.min(1, plain.range.hi) } };
  const slope = subJet(expDifferenceJet(table, 2, 1, y), expDifferenceJet(table, 2, 1, minus));
  return { mean, excess, growth: scaleJet(mulJet(subJet(one, tau), slope), HALF) };
}

/** (2s, 2t, 1 − s² − t²)/(1 + s² + t²); angles left out are zero. */
function axisOf(turn: readonly Jet[], parameters: number): Jet[] {
  const zero = constantJet(ZERO, parameters);
  const one = constantJet(ONE, parameters);
  if (turn.length === 0) return [zero, zero, one];
  const [s, t] = [turn[0], turn[1] ?? zero];
  const scale = scaleJet(reciprocalJet(addJet(one, addJet(squareJet(s), squareJet(t)))), TWO);
  return [mulJet(s, scale), mulJet(t, scale), subJet(scale, one)];
}

/** ab* + ba*, or aa* when they are the same. */
function squareOf(a: readonly Jet[], b: readonly Jet[]): Jet[] {
  return Array.from({ length: 9 }, (_, at) => {
    const [i, j] = [Math.floor(at / 3), at % 3];
    if (a === b) return i === j ? squareJet(a[i]) : mulJet(a[i], a[j]);
    return addJet(mulJet(a[i], b[j]), mulJet(b[i], a[j]));
  });
}

/** Σ_j [v_j]*T[v_j] with [v]a = v×a: entries Σ ε_kmp ε_lnq T_kl C_mn. */
function mixed(t: Symmetric3<Jet>, c: Symmetric3<Interval>): Jet[] {
  return Array.from({ length: 9 }, (_, at) => {
    const [p, q] = [Math.floor(at / 3), at % 3];
    const [k, m, l, n] = [(p + 1) % 3, (p + 2) % 3, (q + 1) % 3, (q + 2) % 3];
    const same = addJet(scaleJet(t[3 * k + l], c[3 * m + n]), scaleJet(t[3 * m + n], c[3 * k + l]));
    const crossed = addJet(scaleJet(t[3 * k + n], c[3 * m + l]), scaleJet(t[3 * m + l], c[3 * k + n]));
    return subJet(same, crossed);
  });
}

function timesConstant(a: readonly Jet[], b: readonly Interval[]): Jet[] {
  return Array.from({ length: 9 }, (_, at) => {
    const row = a.slice(3 * Math.floor(at / 3), 3 * Math.floor(at / 3) + 3);
    return row.map((x, k) => scaleJet(x, b[3 * k + (at % 3)])).reduce(addJet);
  });
}
