export { generate } from './generate.js';
