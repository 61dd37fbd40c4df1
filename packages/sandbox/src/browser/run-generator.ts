import type { GeneratorResult, GeneratorRun } from '../generator-run.js';
import type { Sandbox } from '../pool.js';
import { createSandbox } from './sandbox.js';

let shared: Sandbox | null = null;

/** Runs one generator in a web worker that this page keeps; `sandbox-worker.js` lies beside the script that holds this. Throws as `Sandbox.run` does. */
export function runGenerator(run: GeneratorRun): Promise<GeneratorResult> {
  shared ??= createSandbox({ script: new URL('sandbox-worker.js', import.meta.url) });
  return shared.run(run);
}
