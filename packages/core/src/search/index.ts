export * from './bfgs.js';
export * from './brent.js';
