export * from './linalg/index.js';
export * from './search/index.js';
export * from './entropy/index.js';
export { ERROR_CODES, ThalwegError, type ErrorCode, type ErrorContext } from './errors.js';
export { memoryText } from './memory-text.js';
export { seededRandom, type Random } from './random.js';
export { MEAN_NAMES, type MeanName } from './metric/operator-mean.js';
export * from './sheet/index.js';
export {
  blockAlgebra,
  isCommutative,
  sameAlgebra,
  toCoordinates,
  fromCoordinates,
  basisElement,
  projectToAlgebra,
  offBlockResidual,
  type BlockAlgebra,
} from './algebra/block-algebra.js';
export { decomposeAlgebra, reduceToBlocks, type AlgebraDecomposition } from './algebra/decompose-algebra.js';
export type { Generator, Jump, Origin } from './generator/generator.js';
export { applyGenerator, applyGeneratorAdjoint, generatorMatrix } from './generator/apply-generator.js';
export { generatorNormBound } from './generator/generator-norm.js';
export { withDeclaredState, densityMatrix } from './generator/declared-state.js';
export { lindbladGenerator, type LindbladForm } from './generator/lindblad-generator.js';
export { balancedGenerator, type BalancedForm } from './generator/balanced-generator.js';
export { ratesGenerator } from './generator/rates-generator.js';
export {
  expectationGenerator,
  type ExpectationForm,
  type ExpectationTarget,
} from './generator/expectation-generator.js';
export { lengthGenerator, type LengthForm } from './generator/length-generator.js';
export { finiteGroup, type FiniteGroup, type GroupForm } from './generator/finite-group.js';
export { schurGenerator, type SchurForm } from './generator/schur-generator.js';
export { daviesGenerator, type DaviesForm } from './generator/davies-generator.js';
export type { BathSpectrum } from './generator/bath-spectrum.js';
export { superoperatorGenerator, type SuperoperatorForm } from './generator/superoperator-generator.js';
export { sumGenerator, type SumTerm } from './generator/sum-generator.js';
export { tensorGenerator } from './generator/tensor-generator.js';
export type { MatrixInput } from './generator/matrix-input.js';
export { analyse, type Structure } from './structure/structure.js';
export { markovChecks, isMarkov, type MarkovChecks } from './structure/positivity.js';
export { referenceState, type ReferenceState } from './structure/reference-state.js';
export { symmetryOf, type Symmetry, type SymmetryKind } from './structure/symmetry.js';
export { fixedPoints, type FixedPoints } from './structure/fixed-points.js';
export { canonicalForm, type CanonicalForm, type CanonicalJump } from './structure/canonical-form.js';
export * from './families/index.js';
export * from './constants/index.js';
export { provedWitness } from './witness/enclose-witness.js';
export { verifyWitness, type WitnessCheck } from './witness/verify-witness.js';
export * from './lift/index.js';
export * from './programme/index.js';
export * from './checker/index.js';
export * from './certificate/index.js';
export * from './transport/index.js';
export * from './flow/index.js';
export * from './relief/index.js';
