export * from './search/index.js';
