export {
  blochDisc,
  eigenvalueTriangle,
  planeThrough,
  BLOCH_AXES,
  type BlochAxis,
  type NamedState,
} from './choose-slice.js';
export { curvatureOn, evaluateRings } from './evaluate-relief.js';
export { lowestPoint, type LowestPoint } from './lowest-point.js';
export { LAST_RING, reliefGrid, type ReliefGrid } from './relief-grid.js';
export { usualPlane } from './usual-plane.js';
export { placeOn, reachOf, stateOn, type SliceKind, type SliceMark, type StateSlice } from './state-slice.js';
