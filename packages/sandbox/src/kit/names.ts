export { exp, expm1 } from './functions/exponential.js';
export { cosh, sinh, tanh } from './functions/hyperbolic.js';
export { log, log1p } from './functions/logarithm.js';
export { pow } from './functions/power.js';
export { rootOfUnity } from './functions/root-of-unity.js';
export { sqrt } from './functions/square-root.js';
export { cos, sin } from './functions/trigonometric.js';

export { complex } from './matrix/complex.js';
export { matrix } from './matrix/matrix.js';
export {
  add,
  adjoint,
  anticommutator,
  commutator,
  multiply,
  scale,
  subtract,
  trace,
  transpose,
} from './matrix/arithmetic.js';
export { directSum, kron } from './matrix/products.js';
export { diagonal, entry, identity, matrixUnit, parts, rows, zero } from './matrix/special.js';

export { fermionAnnihilation, fermionCreation, majorana } from './operators/fermion.js';
export { gibbsState, gibbsWeights } from './operators/gibbs.js';
export { annihilation, creation, numberOperator } from './operators/ladder.js';
export { pauli } from './operators/pauli.js';
export { site, sites } from './operators/site.js';
export { spinLowering, spinRaising, spinX, spinY, spinZ } from './operators/spin.js';
export { weyl } from './operators/weyl.js';

export {
  birthDeathChain,
  completeGraph,
  cycleGraph,
  edgeGraph,
  gridGraph,
  hypercubeGraph,
  pathGraph,
} from './discrete/graphs.js';
export { cyclicGroup, dihedralGroup, symmetricGroup, wordLength } from './discrete/groups.js';
export { random } from './discrete/random.js';

export {
  balancedModel,
  daviesModel,
  expectationModel,
  lengthModel,
  lindbladModel,
  ratesModel,
  schurModel,
  sumModel,
  superoperatorModel,
  tensorModel,
} from './model/models.js';
