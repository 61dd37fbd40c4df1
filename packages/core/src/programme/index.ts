export { type Coefficient, type Programme, type ProgrammeBlock } from './programme.js';
export { type ProgrammeIterate, type ProgrammeOptions } from './programme-options.js';
export {
  type DualInfeasibility,
  type PrimalInfeasibility,
  type ProgrammeSolution,
  type ProgrammeStatus,
} from './programme-solution.js';
export { solveProgramme } from './solve-programme.js';
export { deepestFeasible, strictlyFeasible, type BackOffOptions, type FeasiblePoint } from './deepest-feasible.js';
