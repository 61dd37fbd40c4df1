export * from './search/index.js';
export { ERROR_CODES, ThalwegError, type ErrorCode, type ErrorContext } from './errors.js';
export { MEAN_NAMES, type MeanName } from './metric/operator-mean.js';
export { CONSTANT_IDS, type ConstantId } from './sheet/bracket.js';
