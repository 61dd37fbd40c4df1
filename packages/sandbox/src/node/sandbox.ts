import { createPool, type Sandbox } from '../pool.js';
import { GuardedProcess } from './guarded-process.js';
import { processScript } from './process-script.js';

/**
 * A sandbox of at most so many processes: separate processes with an empty environment, a bounded heap and a hard kill. They start when there is
 * work, are kept for the next, and end with this program.
 */
export function createSandbox({ processes = 1 }: { readonly processes?: number } = {}): Sandbox {
  const script = processScript();
  return createPool(() => new GuardedProcess(script), processes);
}
