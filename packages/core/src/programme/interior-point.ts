import { DUAL_DRIFT, PROGRAMME_PATIENCE, PROGRESS, SHORTEST_STEP, SMALL_BARRIER } from '../tolerances.js';
import { type ConicForm } from './conic-form.js';
import { searchInfeasibility, type Ray } from './infeasibility.js';
import { dot } from '../linalg/real-vector.js';
import { measure, type Measures } from './measures.js';
import { NewtonSystem, type NewtonStep } from './newton-system.js';
import { type ProgrammeIterate, type ResolvedOptions } from './programme-options.js';
import { type ProgrammeStatus } from './programme-solution.js';

/** Scaled and flat, as the form. */
export interface InteriorPointResult {
  readonly status: ProgrammeStatus;
  readonly reduced: boolean;
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly s: Float64Array;
  readonly measures: Measures;
  readonly iterations: number;
  readonly ray: Ray | null;
}

/**
 * Primal–dual interior-point method from an infeasible start, with Mehrotra's predictor and corrector and the rules of
 * Toh, Todd & Tütüncü (Optim. Methods Softw. 11 (1999)) for step and centring. `gramFactor` is the Cholesky factor of the <A_i, A_j>.
 */
export function interiorPoint(
  form: ConicForm,
  gramFactor: Float64Array,
  options: ResolvedOptions,
): InteriorPointResult {
  const newton = new NewtonSystem(form);
  const predictor = newton.newStep();
  const corrector = newton.newStep();
  newton.start();
  newton.updateResiduals();
  const best: Best = {
    x: newton.x.slice(),
    y: newton.y.slice(),
    s: newton.s.slice(),
    measures: measure(newton),
    defect: Infinity,
    age: 0,
  };
  let status: ProgrammeStatus;
  let ray: Ray | null = null;
  let iteration = 0;
  for (; ; iteration++) {
    refreshDual(newton);
    const measures = measure(newton);
    const search = searchInfeasibility(newton, measures, gramFactor);
    keepBest(best, newton, measures, search.defect);
    options.onIterate(record(iteration, newton, measures, corrector));
    if (measures.worst <= options.tolerance) status = 'optimal';
    else if (options.stop()) status = 'stopped';
    else if (search.ray) status = `${search.ray.kind}-infeasible`;
    else if (best.age >= PROGRAMME_PATIENCE) status = 'stalled';
    else if (iteration >= options.maxIterations) status = 'iterations';
    else if (advance(newton, measures, predictor, corrector)) continue;
    else status = 'stalled';
    if (status.endsWith('infeasible')) ({ ray } = search);
    break;
  }
  const { measures } = best;
  const reduced = (status === 'stalled' || status === 'iterations') && measures.worst <= options.acceptedTolerance;
  return {
    x: best.x,
    y: best.y,
    s: best.s,
    status: reduced ? 'optimal' : status,
    reduced,
    measures,
    iterations: iteration,
    ray,
  };
}

/** Once the dual residual is rounding, S is recomputed from y, so that it does not drift away. */
function refreshDual(newton: NewtonSystem): void {
  newton.updateResiduals();
  if (Math.sqrt(dot(newton.dualResidual, newton.dualResidual)) > DUAL_DRIFT) return;
  const slack = new Float64Array(newton.s.length);
  newton.dualSlack(slack);
  if (!newton.isPositive(slack)) return;
  newton.s.set(slack);
  newton.dualResidual.fill(0);
}

interface Best {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly s: Float64Array;
  measures: Measures;
  /** Least defect of a ray so far. */
  defect: number;
  /** Iterations since the measures or the defect last improved. */
  age: number;
}

function keepBest(best: Best, newton: NewtonSystem, measures: Measures, defect: number): void {
  best.age++;
  if (defect < PROGRESS * best.defect) {
    best.defect = defect;
    best.age = 0;
  }
  if (measures.worst >= best.measures.worst) return;
  if (measures.worst < PROGRESS * best.measures.worst) best.age = 0;
  best.measures = measures;
  best.x.set(newton.x);
  best.y.set(newton.y);
  best.s.set(newton.s);
}

/** One predictor–corrector step; false if it leads nowhere. */
function advance(newton: NewtonSystem, measures: Measures, predictor: NewtonStep, corrector: NewtonStep): boolean {
  if (!newton.prepare()) return false;
  const mu = measures.complementarity / newton.degree;
  newton.solve(0, null, predictor);
  if (!isFiniteStep(predictor)) return false;
  newton.measureStep(predictor, 1);
  const shortest = Math.min(predictor.primalLength, predictor.dualLength);
  const exponent = mu > SMALL_BARRIER ? Math.max(1, 3 * shortest * shortest) : 1;
  const ratio = stepComplementarity(newton, predictor) / measures.complementarity;
  const centring = Math.min(1, Math.max(ratio, 0) ** exponent);
  newton.solve(centring * mu, predictor, corrector);
  if (!isFiniteStep(corrector)) return false;
  newton.measureStep(corrector, 0.9 + 0.09 * shortest);
  return takeStep(newton, corrector);
}

function isFiniteStep({ x, s }: NewtonStep): boolean {
  return Number.isFinite(dot(x, x) + dot(s, s));
}

/** <X + α dX, S + β dS>. */
function stepComplementarity({ x, s }: NewtonSystem, step: NewtonStep): number {
  const { primalLength: a, dualLength: b } = step;
  return dot(x, s) + a * dot(step.x, s) + b * dot(x, step.s) + a * b * dot(step.x, step.s);
}

/** Moves along the step, shortened until both parts stay positive definite. */
function takeStep(newton: NewtonSystem, step: NewtonStep): boolean {
  step.primalLength = advanceInside(newton, newton.x, step.x, step.primalLength);
  step.dualLength = advanceInside(newton, newton.s, step.s, step.dualLength);
  for (let i = 0; i < newton.y.length; i++) newton.y[i] += step.dualLength * step.y[i];
  return Math.max(step.primalLength, step.dualLength) > SHORTEST_STEP;
}

function advanceInside(newton: NewtonSystem, point: Float64Array, direction: Float64Array, length: number): number {
  const next = new Float64Array(point.length);
  for (let t = length; t > SHORTEST_STEP; t *= 0.8) {
    for (let i = 0; i < next.length; i++) next[i] = point[i] + t * direction[i];
    if (!newton.isPositive(next)) continue;
    point.set(next);
    return t;
  }
  return 0;
}

function record(iteration: number, newton: NewtonSystem, measures: Measures, step: NewtonStep): ProgrammeIterate {
  const unit = newton.form.objectiveNorm * newton.form.constantNorm;
  return {
    iteration,
    barrier: (measures.complementarity / newton.degree) * unit,
    primalObjective: measures.primalObjective * unit,
    dualObjective: measures.dualObjective * unit,
    gap: measures.gap,
    primalInfeasibility: measures.primalInfeasibility,
    dualInfeasibility: measures.dualInfeasibility,
    primalStep: step.primalLength,
    dualStep: step.dualLength,
    schurShift: newton.system.shift,
  };
}
