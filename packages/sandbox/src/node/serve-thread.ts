import { parentPort, workerData } from 'node:worker_threads';
import { runGeneratorCode } from '../engine/run-generator-code.js';
import type { CompleteRun } from '../generator-run.js';

/** In the thread of the sandbox's process: answers each run with its reply. */
export function serveThread(inside: string): void {
  const { wasm } = workerData as { wasm: WebAssembly.Module };
  const engine = { wasm, inside, now: () => performance.now() };
  parentPort?.on('message', (run: CompleteRun) => {
    void runGeneratorCode(engine, run).then((reply) => parentPort?.postMessage(reply));
  });
}
