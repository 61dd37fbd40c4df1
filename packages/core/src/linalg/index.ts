export * from './complex-matrix.js';
export * from './sparse-matrix.js';
export * from './symmetric-eigen.js';
export * from './symmetric-smallest.js';
export * from './symmetric-pencil.js';
export * from './cholesky-real.js';
