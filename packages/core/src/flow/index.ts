export { descend, type Descent, type DescentPoint } from './descent.js';
export {
  boundAt,
  DESCENT_CONSTANTS,
  type DescentBound,
  type DescentConstant,
  type DescentEnds,
  type DescentQuantity,
} from './descent-bounds.js';
