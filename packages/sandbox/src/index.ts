export { type GeneratorResult, type GeneratorRun, type ParameterValue } from './generator-run.js';
export { KIT_VERSION } from './kit/version.js';
export { DEFAULT_LIMITS, type SandboxLimits } from './limits.js';
