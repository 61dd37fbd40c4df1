export { generate } from './generate.js';
export { hardened } from './harden.js';
