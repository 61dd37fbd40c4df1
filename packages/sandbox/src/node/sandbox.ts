import { createPool, type Sandbox } from '../pool.js';
import { GuardedProcess } from './guarded-process.js';
import { processScript } from './process-script.js';

/**
 * A sandbox of at most so many processes: separate processes with an empty environment, a bounded heap and a hard kill. They start when there is
 * work, are kept for the next, and end with this program. `script` is where `sandbox-process.js`, which build.mjs makes, lies, if not beside this module.
 */
export function createSandbox({
  processes = 1,
  script = processScript(),
}: { readonly processes?: number; readonly script?: URL } = {}): Sandbox {
  return createPool(() => new GuardedProcess(script), processes);
}
