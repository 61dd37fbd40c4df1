import { createPool, type Sandbox } from '../pool.js';
import { GuardedWorker } from './guarded-worker.js';

/** A sandbox of at most so many web workers. `script` is where `sandbox-worker.js`, which build.mjs makes, is served. */
export function createSandbox({ script, workers = 1 }: { readonly script: URL; readonly workers?: number }): Sandbox {
  return createPool(() => new GuardedWorker(script), workers);
}
