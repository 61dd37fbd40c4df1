export { geodesicTable, speedRange, type GeodesicPoint, type SpeedRange } from './geodesic.js';
export { transportDistance, type DistanceOptions, type TransportDistance } from './transport-distance.js';
export { transportModel, type TransportModel } from './transport-model.js';
export type { Endpoints } from './transport-states.js';
