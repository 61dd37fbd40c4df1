import { type Interval, ONE, ZERO, add, mul, point, sub } from '../checker/arithmetic/interval.js';
import { type Cell, coordinateJets, isBounded } from './cell.js';
import type { CellForms, FormsOnCell } from './cell-forms.js';
import {
  type Jet,
  addJet,
  constantJet,
  expDifferenceJet,
  expJet,
  loweredJet,
  mulJet,
  negJet,
  reciprocalJet,
  scaleJet,
  subJet,
} from './jet.js';

/** Symmetric 3×3 matrices, row-major. */
export type Symmetric3<T> = readonly T[];

/**
 * The form of a qubit with tracial symmetry. On Bloch vectors, with V_j = v_j·σ and C = Re Σ v_jv_j*, L acts as 4(C − Tr C) and
 * [V_j,A] = 2i(v_j×a)·σ. At a state with eigenvalues 1, τ = e^{−y} and axis e_z the metric is 4 Σ (v_j×a)*T(v_j×a),
 * T = diag(2F,2F,S), F = Λ(1,τ), S = 1+τ, and along the flow T moves by
 *     2|ℓ_zz|P diag(1,1,0) + (S−2F)(d e_z* + e_z d*),   P = ½(1−τ)(Λ₂−Λ₁) ≥ 0,   d = (ℓ_xz, ℓ_yz, 0).
 * The model is turned, not the state: C is taken between the axes, where C = `body`, by the half turn about (s,t,1) that takes
 * e_z to the axis of the state. With `angles` 0 nothing is turned (C is a multiple of 1 within its intervals), with 1 the axis
 * stays in the plane of the first and third axes (C is symmetric about the third within its intervals), with 2 it runs over an octant
 * (C is diagonal). The opposite axis gives the same form. P tends to ∞ with y and counts with its lower end.
 */
export function tracialQubitForms(body: Symmetric3<Interval>, angles: 0 | 1 | 2): CellForms {
  const root = [{ lo: 0, hi: Infinity }, ...new Array<Interval>(angles).fill({ lo: 0, hi: 1 })];
  return { side: 3, root, at: (cell, k) => evaluate(body, cell, k) };
}

function evaluate(body: Symmetric3<Interval>, cell: Cell, k: number): FormsOnCell {
  const [y, ...turn] = coordinateJets(cell);
  const parameters = y.slopes.length;
  const c = turned(body, turn, parameters);
  const trace = addJet(addJet(c[0], c[4]), c[8]);
  const l = c.map((x, at) => scaleJet(at % 4 === 0 ? subJet(x, trace) : x, FOUR));
  const { mean, sum, excess, growth } = functionsOf(y);
  const zero = constantJet(ZERO, parameters);
  const one = constantJet(ONE, parameters);
  const metric = mixed(diagonal(scaleJet(mean, TWO), sum, zero), c);
  const tilt = [zero, zero, mulJet(excess, l[2]), zero, zero, mulJet(excess, l[5]), zero, zero, zero];
  tilt[6] = tilt[2];
  tilt[7] = tilt[5];
  const moved = mixed(tilt, c);
  const across = mixed(diagonal(one, zero, zero), c);
  const speed = mulJet(growth, negJet(l[8]));
  const least = point(Math.max(0, speed.range.lo));
  const lowered = loweredJet({ ...speed, range: { lo: least.lo, hi: speed.range.hi } });
  const image = product(metric, l);
  const below = new Array<Interval>(9).fill(ZERO);
  const jets = new Array<Jet>(9).fill(zero);
  for (let p = 0; p < 3; p++) {
    for (let q = p; q < 3; q++) {
      const at = 3 * p + q;
      const drift = scaleJet(addJet(image[at], image[3 * q + p]), HALF);
      const rest = subJet(subJet(scaleJet(moved[at], HALF), drift), scaleJet(metric[at], point(k)));
      below[at] = add(rest.range, mul(least, across[at].range));
      jets[at] = addJet(rest, mulJet(lowered.jet, across[at]));
    }
  }
  return { below, jets, exact: lowered.exact && cell.every(isBounded) };
}

const HALF = point(0.5);
const TWO = point(2);
const FOUR = point(4);

/** F = exp[0,−y], S = 1 + e^{−y}, S − 2F and P = ½(1 − e^{−y})(exp[0,0,y] − exp[0,0,−y]); S − 2F grows with y from 0 to 1. */
function functionsOf(y: Jet): { mean: Jet; sum: Jet; excess: Jet; growth: Jet } {
  const parameters = y.slopes.length;
  const one = constantJet(ONE, parameters);
  const minus = negJet(y);
  const tau = expJet(minus);
  const mean = expDifferenceJet(1, 1, minus);
  const sum = addJet(one, tau);
  const plain = subJet(sum, scaleJet(mean, TWO));
  const excess = { ...plain, range: { lo: Math.max(0, plain.range.lo), hi: Math.min(1, plain.range.hi) } };
  const slope = subJet(expDifferenceJet(2, 1, y), expDifferenceJet(2, 1, minus));
  return { mean, sum, excess, growth: scaleJet(mulJet(subJet(one, tau), slope), HALF) };
}

/** R*CR for R = 2hh*\/|h|² − 1, h = (s,t,1): C = c + rest with c the first entry, so that multiples of 1 stay as they are. */
function turned(body: Symmetric3<Interval>, turn: readonly Jet[], parameters: number): Jet[] {
  const c = body[0];
  const constants = body.map((x) => constantJet(x, parameters));
  if (turn.length === 0) return constants;
  const zero = constantJet(ZERO, parameters);
  const h = [turn[0], turn[1] ?? zero, constantJet(ONE, parameters)];
  const scale = scaleJet(reciprocalJet(h.map((x) => mulJet(x, x)).reduce(addJet)), TWO);
  const r = Array.from({ length: 9 }, (_, at) => {
    const entry = mulJet(mulJet(h[Math.floor(at / 3)], h[at % 3]), scale);
    return at % 4 === 0 ? subJet(entry, constantJet(ONE, parameters)) : entry;
  });
  const out = Array.from({ length: 9 }, (_, at) => constantJet(at % 4 === 0 ? c : ZERO, parameters));
  body.forEach((x, at) => {
    const rest = at === 0 ? ZERO : at % 4 === 0 ? sub(x, c) : x;
    if (rest.lo === 0 && rest.hi === 0) return;
    const [i, j] = [Math.floor(at / 3), at % 3];
    for (let p = 0; p < 3; p++) {
      for (let q = 0; q < 3; q++) {
        const pair = mulJet(r[3 * i + p], r[3 * j + q]);
        out[3 * p + q] = addJet(out[3 * p + q], scaleJet(pair, rest));
      }
    }
  });
  return out;
}

/** diag(a,a,b). */
function diagonal(a: Jet, b: Jet, zero: Jet): Jet[] {
  return [a, zero, zero, zero, a, zero, zero, zero, b];
}

/** Σ_j [v_j]*T[v_j] with [v]a = v×a: entries Σ ε_kmp ε_lnq T_kl C_mn. */
function mixed(t: Symmetric3<Jet>, c: Symmetric3<Jet>): Jet[] {
  const out: Jet[] = [];
  for (let p = 0; p < 3; p++) {
    for (let q = 0; q < 3; q++) {
      const [k, m, l, n] = [(p + 1) % 3, (p + 2) % 3, (q + 1) % 3, (q + 2) % 3];
      const same = addJet(mulJet(t[3 * k + l], c[3 * m + n]), mulJet(t[3 * m + n], c[3 * k + l]));
      const crossed = addJet(mulJet(t[3 * k + n], c[3 * m + l]), mulJet(t[3 * m + l], c[3 * k + n]));
      out.push(subJet(same, crossed));
    }
  }
  return out;
}

function product(a: readonly Jet[], b: readonly Jet[]): Jet[] {
  return Array.from({ length: 9 }, (_, at) => {
    const [i, j] = [Math.floor(at / 3), at % 3];
    return addJet(addJet(mulJet(a[3 * i], b[j]), mulJet(a[3 * i + 1], b[3 + j])), mulJet(a[3 * i + 2], b[6 + j]));
  });
}
