import { log } from '../checker/arithmetic/interval-log.js';
import { type Interval, ONE, ZERO, add, div, mul, neg, point, sub } from '../checker/arithmetic/interval.js';
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
  scaleJet,
  subJet,
} from './jet.js';

/** Rates x→y of a chain in the order of a chart, row x, column y, each enclosed; the diagonal is not read. */
export type ChainRates = readonly (readonly Interval[])[];

/**
 * The form over the measures with ρ_1 ≥ … ≥ ρ_n, log(ρ_i/ρ_{i+1}) = y_i ∈ [0,∞], in the differences a_{i+1} − a_i. With
 * s = r_xyρ_x, t = r_yxρ_y, the metric is Σ Λ(s,t)(a_y − a_x)² over pairs x < y (Maas 2011), and Λ = sΛ₁ + tΛ₂, so that
 *     q − K‖·‖² = Σ ½(r_xyΛ₁ in_x + r_yxΛ₂ in_y) dd* + sΛ₁(B − ½out_x dd*) + tΛ₂(B − ½out_y dd*),
 * d a = a_y − a_x, B = −½(d (dL)* + (dL)d*) − K dd*, in_x = Σ_v r_vxρ_v, out_x = Σ_v r_xv. The first coefficient is positive,
 * so that its lower end stands for it; with u = log(s/t), Λ₁ = exp[0,0,−u], Λ₂ = exp[0,0,u], tΛ₂ = s exp[0,−u,−u].
 */
export function chainForms(rates: ChainRates): CellForms {
  const n = rates.length;
  const side = n - 1;
  const out = rates.map((row, x) => row.reduce((sum, r, y) => (y === x ? sum : add(sum, r)), ZERO));
  const edges = edgesOf(rates);
  return {
    side,
    root: new Array<Interval>(side).fill({ lo: 0, hi: Infinity }),
    at: (cell, k) => evaluate(rates, out, edges, cell, k),
  };
}

interface Edge {
  readonly x: number;
  readonly y: number;
  /** log(r_xy/r_yx). */
  readonly bias: Interval;
  /** dL in the differences. */
  readonly flow: readonly Interval[];
}

function edgesOf(rates: ChainRates): Edge[] {
  const n = rates.length;
  const rows = rates.map((row, x) => generatorRow(row, x));
  const edges: Edge[] = [];
  for (let x = 0; x < n; x++) {
    for (let y = x + 1; y < n; y++) {
      if (rates[x][y].hi === 0 && rates[y][x].hi === 0) continue;
      const flow = rows[y].map((value, k) => sub(value, rows[x][k]));
      edges.push({ x, y, bias: log(div(rates[x][y], rates[y][x])), flow });
    }
  }
  return edges;
}

/** (La)_x = Σ_v r_xv(a_v − a_x) in the differences. */
function generatorRow(row: readonly Interval[], x: number): Interval[] {
  return Array.from({ length: row.length - 1 }, (_, k) => {
    let sum = ZERO;
    row.forEach((r, v) => {
      if (x <= k && k < v) sum = add(sum, r);
      if (v <= k && k < x) sum = sub(sum, r);
    });
    return sum;
  });
}

function evaluate(
  rates: ChainRates,
  out: readonly Interval[],
  edges: readonly Edge[],
  cell: Cell,
  k: number,
): FormsOnCell {
  const side = cell.length;
  const y = coordinateJets(cell);
  const parameters = y[0].slopes.length;
  const zero = constantJet(ZERO, parameters);
  const logs = [zero];
  y.forEach((step) => logs.push(subJet(logs[logs.length - 1], step)));
  const rho = logs.map((x) => (x === zero ? constantJet(ONE, parameters) : expJet(x)));
  const inflow = rho.map((_, x) => {
    let sum = zero;
    rates.forEach((row, v) => {
      if (v !== x && row[x].hi > 0) sum = addJet(sum, scaleJet(rho[v], row[x]));
    });
    return sum;
  });
  const below = new Array<Interval>(side * side).fill(ZERO);
  const jets = new Array<Jet>(side * side).fill(zero);
  let exact = true;
  for (const edge of edges) {
    const { growth, first, second } = coefficients(edge, rates, rho, y, inflow);
    const half = point(0.5);
    const lowered = loweredJet(growth);
    exact &&= lowered.exact;
    for (let i = 0; i < side; i++) {
      for (let j = i; j < side; j++) {
        const [di, dj] = [inside(edge, i), inside(edge, j)];
        if (!di && !dj) continue;
        const dd = di && dj ? ONE : ZERO;
        const cross = add(di ? edge.flow[j] : ZERO, dj ? edge.flow[i] : ZERO);
        const b = sub(neg(mul(half, cross)), mul(point(k), dd));
        const withFirst = sub(b, mul(half, mul(out[edge.x], dd)));
        const withSecond = sub(b, mul(half, mul(out[edge.y], dd)));
        const rest = addJet(scaleJet(first, withFirst), scaleJet(second, withSecond));
        const at = i * side + j;
        below[at] = add(below[at], rest.range);
        jets[at] = addJet(jets[at], rest);
        if (di && dj) {
          below[at] = add(below[at], mul(half, point(growth.range.lo)));
          jets[at] = addJet(jets[at], scaleJet(lowered.jet, half));
        }
      }
    }
  }
  return { below, jets, exact: exact && cell.every(isBounded) };
}

/** r_xyΛ₁ in_x + r_yxΛ₂ in_y, sΛ₁ and tΛ₂ of one edge. */
function coefficients(
  { x, y, bias }: Edge,
  rates: ChainRates,
  rho: readonly Jet[],
  steps: readonly Jet[],
  inflow: readonly Jet[],
): { growth: Jet; first: Jet; second: Jet } {
  const parameters = rho[0].slopes.length;
  let u = constantJet(bias, parameters);
  for (let k = x; k < y; k++) u = addJet(u, steps[k]);
  const minus = negJet(u);
  const s = scaleJet(rho[x], rates[x][y]);
  const alpha = expDifferenceJet(2, 1, minus);
  const growth = addJet(
    scaleJet(mulJet(alpha, inflow[x]), rates[x][y]),
    scaleJet(mulJet(expDifferenceJet(2, 1, u), inflow[y]), rates[y][x]),
  );
  return { growth, first: mulJet(s, alpha), second: mulJet(s, expDifferenceJet(1, 2, minus)) };
}

function inside({ x, y }: Edge, k: number): boolean {
  return x <= k && k < y;
}
