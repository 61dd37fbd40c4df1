import { PROGRAMME_ACCEPTED, PROGRAMME_ITERATIONS, PROGRAMME_TOLERANCE } from '../tolerances.js';

/** What one iteration knows; values as in `ProgrammeSolution`. */
export interface ProgrammeIterate {
  readonly iteration: number;
  /** <X, S> / Σ block sizes, in the units of the objective. */
  readonly barrier: number;
  readonly primalObjective: number;
  readonly dualObjective: number;
  readonly gap: number;
  readonly primalInfeasibility: number;
  readonly dualInfeasibility: number;
  /** Fractions of the Newton step that led here, 0 at the start. */
  readonly primalStep: number;
  readonly dualStep: number;
  /** Raise of the last Schur complement's diagonal, in units of its rounding; 0 where none was needed. */
  readonly schurShift: number;
}

export interface ProgrammeOptions {
  /** Relative gap and infeasibilities aimed at. */
  readonly tolerance?: number;
  /** The same, at which a solution still counts as optimal when no more progress is possible. */
  readonly acceptedTolerance?: number;
  readonly maxIterations?: number;
  readonly onIterate?: (record: ProgrammeIterate) => void;
  /** Asked before every iteration; true ends with the status `stopped` and the best point so far. */
  readonly stop?: () => boolean;
}

export type ResolvedOptions = Required<ProgrammeOptions>;

export function resolveOptions(options: ProgrammeOptions): ResolvedOptions {
  return {
    tolerance: options.tolerance ?? PROGRAMME_TOLERANCE,
    acceptedTolerance: Math.max(options.acceptedTolerance ?? PROGRAMME_ACCEPTED, options.tolerance ?? 0),
    maxIterations: options.maxIterations ?? PROGRAMME_ITERATIONS,
    onIterate: options.onIterate ?? ((): void => undefined),
    stop: options.stop ?? ((): boolean => false),
  };
}
