import { positiveBound } from '../constants/lower-ends.js';
import { type ComplexMatrix, frobeniusNorm, multiply } from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import type { ConstantId, End, Grade } from '../sheet/bracket.js';
import type { FlowLimit } from './flow-limit.js';
import type { FlowQuantities } from './flow-quantities.js';

/** The constants whose lower ends bound a flow. */
export const DESCENT_CONSTANTS = ['gap', 'ge', 'cge', 'mlsi', 'clsi'] as const satisfies readonly ConstantId[];

export type DescentConstant = (typeof DESCENT_CONSTANTS)[number];

export type DescentEnds = Readonly<Partial<Record<DescentConstant, End | null>>>;

export type DescentQuantity = 'entropy' | 'production' | 'distance';

/** What a proved constant says of one quantity along a flow. */
export interface DescentBound {
  readonly constant: DescentConstant;
  readonly quantity: DescentQuantity;
  /** r of e^{−rt}; twice the constant for entropies. */
  readonly rate: number;
  /** Bound on the floating-point error of the rate. */
  readonly margin: number;
  readonly grade: Grade;
  /** Where the constant comes from. */
  readonly by: string;
  /** The inequality, plain text. */
  readonly formula: string;
  /** The bound holds from this time on: 0, or the first one at which the production is finite. */
  readonly from: number;
  /** What stands before e^{−rt}. */
  readonly prefactor: number;
  /** `plain`: prefactor·e^{−r(t−from)}; `log1p`: log(1 + prefactor·e^{−rt}). */
  readonly form: 'plain' | 'log1p';
}

/** The value of a bound at a time, for its rate or a smaller one. */
export function boundAt({ form, prefactor, rate, from }: DescentBound, time: number, margin = 0): number {
  const value = prefactor * Math.exp(-(rate - margin) * (time - from));
  return form === 'plain' ? value : Math.log1p(value);
}

interface Start {
  readonly time: number;
  readonly quantities: FlowQuantities;
}

/**
 * The exponential bounds of the proved constants: `mlsi` and `clsi` on the entropy by definition and, by the inequality of
 * Pinsker, on the trace distance; `ge` and `cge` on the entropy production, as d²D/dt² = 2q(log ρ − log σ) ≥ 2K I; `gap` on the
 * trace distance, ‖Y‖₁ ≤ ‖σ^{-1/4}Yσ^{-1/4}‖₂, and for a primitive generator on the entropy, D(ρ‖σ) ≤ log Tr (σ^{-1/4}ρσ^{-1/4})²,
 * the sandwiched Rényi divergence of order 2 (Müller-Lennert, Dupuis, Szehr, Fehr & Tomamichel, J. Math. Phys. 54 (2013)).
 */
export function descentBounds(
  ends: DescentEnds,
  limit: FlowLimit,
  deviation: ComplexMatrix,
  starts: readonly Start[],
): DescentBound[] {
  const [{ quantities }] = starts;
  const bounds: DescentBound[] = [];
  const add = (
    constant: DescentConstant,
    quantity: DescentQuantity,
    multiple: 1 | 2,
    rest: Pick<DescentBound, 'formula' | 'prefactor'> & Partial<Pick<DescentBound, 'from' | 'form'>>,
  ): void => {
    const end = positiveBound(ends[constant] ?? null);
    if (!end || !Number.isFinite(rest.prefactor)) return;
    const { grade, by, margin = 0 } = end;
    const rate = multiple * end.value;
    bounds.push({ constant, quantity, rate, margin: multiple * margin, grade, by, from: 0, form: 'plain', ...rest });
  };
  const chi = chiSquare(limit, deviation);
  add('mlsi', 'entropy', 2, { formula: 'D(ρ_t‖E†ρ) ≤ e^{−2αt} D(ρ‖E†ρ)', prefactor: quantities.entropy });
  add('clsi', 'entropy', 2, { formula: 'D(ρ_t‖E†ρ) ≤ e^{−2αt} D(ρ‖E†ρ)', prefactor: quantities.entropy });
  if (limit.primitive) {
    const formula = 'D(ρ_t‖σ) ≤ log(1 + e^{−2λt} χ²), χ² = ‖σ^{-1/4}(ρ−σ)σ^{-1/4}‖²';
    add('gap', 'entropy', 2, { formula, prefactor: chi, form: 'log1p' });
  }
  const finite = starts.find((start) => Number.isFinite(start.quantities.production));
  for (const constant of ['ge', 'cge'] as const) {
    if (!finite) continue;
    const { time, quantities: first } = finite;
    const formula = time > 0 ? 'I(ρ_t) ≤ e^{−2K(t−s)} I(ρ_s), s the first time after 0' : 'I(ρ_t) ≤ e^{−2Kt} I(ρ)';
    add(constant, 'production', 2, { formula, prefactor: first.production, from: time });
  }
  const pinsker = Math.sqrt(2 * quantities.entropy);
  add('mlsi', 'distance', 1, { formula: '‖ρ_t − E†ρ‖₁ ≤ e^{−αt} √(2 D(ρ‖E†ρ)), Pinsker', prefactor: pinsker });
  const variance = '‖ρ_t − E†ρ‖₁ ≤ e^{−λt} ‖σ^{-1/4}(ρ − E†ρ)σ^{-1/4}‖₂';
  add('gap', 'distance', 1, { formula: variance, prefactor: Math.sqrt(chi) });
  return bounds;
}

/** ‖σ^{-1/4}(ρ − E†ρ)σ^{-1/4}‖₂². */
function chiSquare({ state }: FlowLimit, deviation: ComplexMatrix): number {
  const quarter = matrixFunction(state, (x) => x ** -0.25);
  return frobeniusNorm(multiply(quarter, multiply(deviation, quarter))) ** 2;
}
