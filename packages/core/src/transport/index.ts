export { NOTIONS, notionsAgree, worstNotion, type Notion, type NotionValue } from './compare-notions.js';
export { comparePair, type PairComparison } from './compare-pair.js';
export { comparisonStarts, type ComparisonStart } from './comparison-starts.js';
export { comparisonWitness } from './comparison-witness.js';
export { geodesicTable, speedRange, type GeodesicPoint, type SpeedRange } from './geodesic.js';
export {
  INEQUALITY_NAMES,
  inequalitiesAt,
  type InequalityConstants,
  type InequalityName,
  type InequalitySlack,
} from './inequalities.js';
export type { ObservedConstant } from './observed-constant.js';
export { transportDistance, type DistanceOptions, type TransportDistance } from './transport-distance.js';
export { transportModel, type TransportModel } from './transport-model.js';
export type { Endpoints } from './transport-states.js';
