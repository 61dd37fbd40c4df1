import type { GeneratorResult, GeneratorRun } from '../generator-run.js';
import type { Sandbox } from '../pool.js';
import { createSandbox } from './sandbox.js';

let shared: Sandbox | null = null;

/** Runs one generator in a process that this program keeps for all of them. Throws as `Sandbox.run` does. */
export function runGenerator(run: GeneratorRun): Promise<GeneratorResult> {
  shared ??= createSandbox();
  return shared.run(run);
}
