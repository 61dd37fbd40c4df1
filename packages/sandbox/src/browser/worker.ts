import wasm from '@jitl/quickjs-wasmfile-release-sync/wasm';
import { runGeneratorCode } from '../engine/run-generator-code.js';
import type { CompleteRun } from '../generator-run.js';

const bytes: Uint8Array<ArrayBuffer> = wasm;

/** Entry of the web worker, built by build.mjs into one file: says `ready`, then answers each run with its reply. */
const engine = { wasm: new WebAssembly.Module(bytes), inside: SANDBOX_INSIDE, now: () => performance.now() };

addEventListener('message', ({ data }: MessageEvent<CompleteRun>) => {
  void runGeneratorCode(engine, data).then((reply) => postMessage(reply));
});

postMessage('ready');
