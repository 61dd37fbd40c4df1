import { isMainThread } from 'node:worker_threads';
import wasm from '@jitl/quickjs-wasmfile-release-sync/wasm';
import { serveProcess } from './serve-process.js';
import { serveThread } from './serve-thread.js';

const bytes: Uint8Array<ArrayBuffer> = wasm;

/** Entry of the sandbox's own process and of the thread inside it; built by build.mjs into one file. */
if (isMainThread) serveProcess(new URL(import.meta.url), new WebAssembly.Module(bytes));
else serveThread(SANDBOX_INSIDE);
