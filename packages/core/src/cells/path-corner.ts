import { expDifference } from '../checker/arithmetic/exp-difference.js';
import { log } from '../checker/arithmetic/interval-log.js';
import { type Interval, ONE, ZERO, add, div, mul, neg, point, sqr, sub } from '../checker/arithmetic/interval.js';
import type { Cell } from './cell.js';
import type { ChainRates } from './chain-edges.js';

/**
 * Three points in a row, ρ_1 ≥ ρ_2 ≥ ρ_3, over the corner y_1 ≥ Y_1, y_2 ≥ Y_2, where a positive factor of the second difference tends
 * to zero with ρ_2. A matrix below D(q − K‖·‖²)D, D = diag(√ρ_2/θ, 1/√ρ_2), θ = Λ(r_12ρ_1, r_21ρ_2), which is positive when the
 * form is. With u, u' the logarithms of r_12ρ_1/(r_21ρ_2) and r_23ρ_2/(r_32ρ_3), B = θ(…) as in `chainForms`, b and b' its entries
 * on the diagonal:
 *     first   ½R(u) + (ρ_2/θ)·min(b − ½out_1, b − ½out_2, 0),   R(u) = exp[0,−u,−u]/exp[0,−u]²,   ρ_2/θ = 1/(r_21 exp[0,u]),
 *     mixed   −½(r_23 + r_21 r_23 exp[0,−u'] ρ_2/θ),
 *     second  ½r_23r_32 exp[0,0,u'] + r_23 exp[0,0,−u'](½r_12/ρ_2 + b' − ½out_2) + r_23 exp[0,−u',−u'](b' − ½out_3).
 * R grows with u, for it is minus the derivative of the convex function z/(e^z − 1) at −u.
 */
export function pathCorner(rates: ChainRates, cell: Cell, k: number): Interval[] {
  const [y1, y2] = cell.map(({ lo }) => point(lo));
  const u = lowest(add(log(div(rates[0][1], rates[1][0])), y1));
  const next = lowest(add(log(div(rates[1][2], rates[2][1])), y2));
  const out2 = add(rates[1][0], rates[1][2]);
  const share = div(ONE, mul(rates[1][0], expDifference([ZERO, u])));
  const b = sub(add(rates[0][1], rates[1][0]), point(k));
  const slope = div(expDifference([ZERO, neg(u), neg(u)]), sqr(expDifference([ZERO, neg(u)])));
  const first = add(half(slope), mul(share, least(ZERO, sub(b, half(rates[0][1])), sub(b, half(out2)))));
  const most = mul(mul(rates[1][0], share), expDifference([ZERO, neg(next)]));
  const mixed = neg(half(mul(rates[1][2], { lo: 1, hi: add(ONE, most).hi })));
  const c = sub(add(rates[1][2], rates[2][1]), point(k));
  const inflow = sub(add(half(mul(rates[0][1], expDifference([y1]))), c), half(out2));
  const losses = add(
    mul(expDifference([ZERO, ZERO, neg(next)]), least(ZERO, inflow)),
    mul(expDifference([ZERO, neg(next), neg(next)]), least(ZERO, sub(c, half(rates[2][1])))),
  );
  const gain = half(mul(rates[2][1], expDifference([ZERO, ZERO, next])));
  const second = mul(rates[1][2], add(gain, losses));
  return [point(first.lo), mixed, mixed, point(Math.min(second.lo, Number.MAX_VALUE))];
}

/** True where `pathCorner` applies: three points in a row in the order of the chart, both parameters unbounded. */
export function isPathCorner(rates: ChainRates, cell: Cell): boolean {
  return rates.length === 3 && rates[0][2].hi === 0 && rates[2][0].hi === 0 && cell.every(({ hi }) => hi === Infinity);
}

const HALF = point(0.5);

function half(x: Interval): Interval {
  return mul(HALF, x);
}

function lowest({ lo }: Interval): Interval {
  return point(lo);
}

/** The least of the lower ends. */
function least(...all: readonly Interval[]): Interval {
  return point(Math.min(...all.map(({ lo }) => lo)));
}
