import { type Interval, ONE, ZERO, add, mul, neg, point, sub } from '../checker/arithmetic/interval.js';
import { type ChainEdge, type ChainRates, chainEdges } from './chain-edges.js';
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
  scaleJet,
  subJet,
} from './jet.js';
import { isPathCorner, pathCorner } from './path-corner.js';

/**
 * The form over the measures with ρ_1 ≥ … ≥ ρ_n, log(ρ_i/ρ_{i+1}) = y_i ∈ [0,∞] in the coordinates of `chainEdges`. With
 * s = r_xyρ_x, t = r_yxρ_y, the metric is Σ Λ(s,t)(a_y − a_x)² over pairs x < y (Maas 2011), and Λ = sΛ₁ + tΛ₂, so that
 *     q − K‖·‖² = Σ ½(r_xyΛ₁ in_x + r_yxΛ₂ in_y) dd* + sΛ₁(B − ½out_x dd*) + tΛ₂(B − ½out_y dd*),
 * d a = a_y − a_x, B = −½(d (dL)* + (dL)d*) − K dd*, in_x = Σ_v r_vxρ_v, out_x = Σ_v r_xv. The first coefficient is positive,
 * so that its lower end stands for it; with u = log(s/t), Λ₁ = exp[0,0,−u], Λ₂ = exp[0,0,u], tΛ₂ = s exp[0,−u,−u].
 */
export function chainForms(rates: ChainRates): CellForms {
  const n = rates.length;
  const side = n - 1;
  const out = rates.map((row, x) => row.reduce((sum, r, y) => (y === x ? sum : add(sum, r)), ZERO));
  const model: ChainModel = { rates, out, edges: chainEdges(rates), table: expTable() };
  return {
    side,
    root: new Array<Interval>(side).fill({ lo: 0, hi: Infinity }),
    at: (cell, k) => {
      const forms = evaluate(model, cell, k);
      return isPathCorner(rates, cell) ? { ...forms, below: pathCorner(rates, cell, k) } : forms;
    },
  };
}

interface ChainModel {
  readonly rates: ChainRates;
  /** Σ_v r_xv. */
  readonly out: readonly Interval[];
  readonly edges: readonly ChainEdge[];
  readonly table: ExpTable;
}

function evaluate(model: ChainModel, cell: Cell, k: number): FormsOnCell {
  const { rates, out, edges, table } = model;
  const side = cell.length;
  const y = coordinateJets(cell);
  const parameters = y[0].slopes.length;
  const zero = constantJet(ZERO, parameters);
  const logs = [zero];
  y.forEach((step) => logs.push(subJet(logs[logs.length - 1], step)));
  const rho = logs.map((x) => (x === zero ? constantJet(ONE, parameters) : expDifferenceJet(table, 0, 1, x)));
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
    const { growth, first, second } = coefficients(model, edge, rho, y, inflow);
    const half = point(0.5);
    const lowered = loweredJet(growth);
    exact &&= lowered.exact;
    for (let i = 0; i < side; i++) {
      for (let j = i; j < side; j++) {
        const [di, dj] = [point(edge.difference[i]), point(edge.difference[j])];
        const dd = mul(di, dj);
        const cross = add(mul(di, edge.flow[j]), mul(dj, edge.flow[i]));
        const b = sub(neg(mul(half, cross)), mul(point(k), dd));
        const withFirst = sub(b, mul(half, mul(out[edge.x], dd)));
        const withSecond = sub(b, mul(half, mul(out[edge.y], dd)));
        const rest = addJet(scaleJet(first, withFirst), scaleJet(second, withSecond));
        const at = i * side + j;
        below[at] = add(below[at], rest.range);
        jets[at] = addJet(jets[at], rest);
        below[at] = add(below[at], mul(half, mul(dd, point(growth.range.lo))));
        jets[at] = addJet(jets[at], scaleJet(lowered.jet, mul(half, dd)));
      }
    }
  }
  return { below, jets, exact: exact && cell.every(isBounded) };
}

/** r_xyΛ₁ in_x + r_yxΛ₂ in_y, sΛ₁ and tΛ₂ of one edge. */
function coefficients(
  { rates, table }: ChainModel,
  { x, y, bias }: ChainEdge,
  rho: readonly Jet[],
  steps: readonly Jet[],
  inflow: readonly Jet[],
): { growth: Jet; first: Jet; second: Jet } {
  const parameters = rho[0].slopes.length;
  let u = constantJet(bias, parameters);
  for (let k = x; k < y; k++) u = addJet(u, steps[k]);
  const minus = negJet(u);
  const s = scaleJet(rho[x], rates[x][y]);
  const alpha = expDifferenceJet(table, 2, 1, minus);
  const growth = addJet(
    scaleJet(mulJet(alpha, inflow[x]), rates[x][y]),
    scaleJet(mulJet(expDifferenceJet(table, 2, 1, u), inflow[y]), rates[y][x]),
  );
  return { growth, first: mulJet(s, alpha), second: mulJet(s, expDifferenceJet(table, 1, 2, minus)) };
}
