export { runGenerator } from './run-generator.js';
export { createSandbox, type Sandbox } from './sandbox.js';
