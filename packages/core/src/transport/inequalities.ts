import { fromCoordinates } from '../algebra/block-algebra.js';
import { entropyProduction } from '../entropy/entropy-production.js';
import { relativeEntropy } from '../entropy/relative-entropy.js';
import { generatorMatrix } from '../generator/apply-generator.js';
import type { End } from '../sheet/bracket.js';
import { CONTRACTION_TIME, INEQUALITY_ROUNDING, INEQUALITY_WIDTH } from './tolerances.js';
import { flowed } from './flowed.js';
import { type TransportDistance, transportDistance } from './transport-distance.js';
import type { TransportModel } from './transport-model.js';
import { type Endpoints, endpointsOf } from './transport-states.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';

export const INEQUALITY_NAMES = ['contraction', 'hwi', 't2', 'diameter'] as const;

export type InequalityName = (typeof INEQUALITY_NAMES)[number];

/** The ends of constants that the inequalities rest on: lower ones, the upper one of the diameter. */
export interface InequalityConstants {
  readonly ge: End | null;
  readonly t2: End | null;
  readonly diameter: End | null;
}

/** An inequality on one pair of states: right side minus left side, with the half width that the brackets of distances leave. */
export interface InequalitySlack {
  readonly name: InequalityName;
  /** A length (contraction, diameter), a number (HWI) or a time (T2: W² ≤ (2/κ)D). */
  readonly slack: number;
  readonly error: number;
  /** slack relative to the right side. */
  readonly relative: number;
  readonly status: 'holds' | 'undecided' | 'violated';
}

/**
 * What a proved curvature K, transport–entropy constant κ and diameter promise of two states ρ, ν (Erbar & Maas 2012; Carlen & Maas
 * 2017): W(P_t†ρ,P_t†ν) ≤ e^{−Kt}W(ρ,ν); D ≤ W√I − (K/2)W² and W² ≤ (2/κ)D with W = W(ρ,E†ρ), D = D(ρ‖E†ρ), I = I(ρ); W(ρ,ν) ≤
 * diameter. Constants that are not known leave theirs out. `rate` sets the time of the first.
 */
export function inequalitiesAt(
  model: TransportModel,
  rho: ComplexMatrix,
  nu: ComplexMatrix,
  constants: InequalityConstants,
  rate: number,
  stop: () => boolean = () => false,
): InequalitySlack[] {
  const endpoints = endpointsOf(model, rho, nu);
  if (endpoints.relation !== 'apart') return [];
  const between = (a: ComplexMatrix, b: ComplexMatrix): TransportDistance =>
    transportDistance(model, a, b, { relativeWidth: INEQUALITY_WIDTH, stop });
  const whole = range(between(rho, nu));
  const out: InequalitySlack[] = [];
  const { ge, diameter } = constants;
  if (ge && Number.isFinite(ge.value)) {
    out.push(contraction(model, endpoints, whole, ge.value, CONTRACTION_TIME / rate, between));
  }
  if (diameter) out.push(judged('diameter', whole, [diameter.value, diameter.value]));
  out.push(...entropyInequalities(model, endpoints, rho, constants, between));
  return out;
}

type Range = readonly [number, number];

function contraction(
  { structure }: TransportModel,
  { from, to }: Endpoints,
  whole: Range,
  k: number,
  time: number,
  between: (a: ComplexMatrix, b: ComplexMatrix) => TransportDistance,
): InequalitySlack {
  const l = generatorMatrix(structure.generator);
  const [a, b] = [from, to].map((x) => fromCoordinates(structure.algebra, flowed(l, x, time)));
  const factor = Math.exp(-k * time);
  return judged('contraction', range(between(a, b)), [factor * whole[0], factor * whole[1]]);
}

function entropyInequalities(
  { structure }: TransportModel,
  { centre }: Endpoints,
  rho: ComplexMatrix,
  { ge, t2 }: InequalityConstants,
  between: (a: ComplexMatrix, b: ComplexMatrix) => TransportDistance,
): InequalitySlack[] {
  const reference = fromCoordinates(structure.algebra, centre);
  const entropy = relativeEntropy(rho, reference);
  const fall = range(between(rho, reference));
  const out: InequalitySlack[] = [];
  if (ge && Number.isFinite(ge.value)) {
    const root = Math.sqrt(entropyProduction(structure, rho));
    const sides = fall.map((w) => w * root - (ge.value / 2) * w * w);
    out.push(judged('hwi', [entropy, entropy], [Math.min(...sides), Math.max(...sides)]));
  }
  if (t2 && t2.value > 0) {
    const side = (2 / t2.value) * entropy;
    out.push(judged('t2', [fall[0] ** 2, fall[1] ** 2], [side, side]));
  }
  return out;
}

function range({ lower, upper }: TransportDistance): Range {
  return [lower.value, upper.value];
}

function judged(name: InequalityName, left: Range, right: Range): InequalitySlack {
  const [worst, best] = [right[0] - left[1], right[1] - left[0]];
  const rounding = INEQUALITY_ROUNDING * Math.abs(right[1]);
  const status = worst >= -rounding ? 'holds' : best < -rounding ? 'violated' : 'undecided';
  const slack = (worst + best) / 2;
  return { name, slack, error: (best - worst) / 2, relative: slack / Math.abs(right[1]), status };
}
