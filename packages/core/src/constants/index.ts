export { bakryEmery, completeBakryEmery, type BakryEmeryResult, type CompleteBakryEmery } from './bakry-emery.js';
export { carreDuChamp, type CarreDuChamp } from './carre-du-champ.js';
export { clsiTasks } from './clsi.js';
export {
  CONVENTION_NAMES,
  conventionOf,
  convert,
  definitionOf,
  type Convention,
  type ConventionName,
} from './conventions.js';
export { isUnitarilyCovariant } from './covariance.js';
export { completeCurvatureRule } from './curvature-rules.js';
export { gapDense, type Gap } from './gap.js';
export { gapMatrixFree, type LanczosGap } from './gap-matrix-free.js';
export {
  gradientEstimateAt,
  runGradientEstimateStart,
  type GradientEstimateProblem,
  type GradientEstimateResult,
} from './gradient-estimate.js';
export { lsiTasks, runLsiStart } from './lsi.js';
export { lsiAt } from './lsi-quotient.js';
export { mlsiTasks, runMlsiStart } from './mlsi.js';
export { mlsiAt, type EntropyQuotient } from './mlsi-quotient.js';
export { searchStarts, type SearchStart } from './search-starts.js';
