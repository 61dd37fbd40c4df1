export { type GeneratorResult, type GeneratorRun, type ParameterValue } from './generator-run.js';
export { DEFAULT_LIMITS, type SandboxLimits } from './limits.js';
