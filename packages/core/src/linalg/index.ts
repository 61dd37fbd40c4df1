export * from './complex-matrix.js';
export * from './sparse-matrix.js';
