export { type Sandbox } from '../pool.js';
export { runGenerator } from './run-generator.js';
export { createSandbox } from './sandbox.js';
