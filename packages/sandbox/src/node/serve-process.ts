import { Worker } from 'node:worker_threads';
import { timeFault } from '../engine/faults.js';
import type { CompleteRun } from '../generator-run.js';
import { GRACE_MILLISECONDS, THREAD_STACK_MEGABYTES } from '../limits.js';
import type { RunReply } from '../reply.js';
import { readLines } from './read-lines.js';

const THREAD_HEAP_MEGABYTES = 128;

/**
 * In the sandbox's process: a line of JSON on stdin is a run, a line on stdout its reply; the first line says `ready`. The
 * thread with a stack of its own size is kept from run to run unless it was poisoned. Ends with its parent.
 */
export function serveProcess(script: URL, wasm: WebAssembly.Module): void {
  let thread = startThread(script, wasm);
  const renew = (): void => {
    void thread.terminate();
    thread = startThread(script, wasm);
  };
  const answer = (value: unknown): void => void process.stdout.write(`${JSON.stringify(value)}\n`);
  readLines(process.stdin, (line) => {
    const run = JSON.parse(line) as CompleteRun;
    void runInThread(thread, run).then((reply) => {
      if ('fault' in reply && reply.poisoned) renew();
      answer(reply);
    });
  });
  process.stdin.on('close', () => process.kill(process.pid, 'SIGKILL'));
  answer('ready');
}

function startThread(script: URL, wasm: WebAssembly.Module): Worker {
  const resourceLimits = { stackSizeMb: THREAD_STACK_MEGABYTES, maxOldGenerationSizeMb: THREAD_HEAP_MEGABYTES };
  const thread = new Worker(script, { workerData: { wasm }, env: {}, execArgv: [], stdin: false, resourceLimits });
  // A thread that breaks between runs is found broken by the next one.
  return thread.on('error', () => undefined);
}

/** The reply of the thread; when it ends or overruns its deadline, a fault that poisons it. */
function runInThread(thread: Worker, run: CompleteRun): Promise<RunReply> {
  return new Promise((resolve) => {
    const settle = (reply: RunReply): void => {
      clearTimeout(timer);
      thread.off('message', settle).off('error', crash).off('exit', crash);
      resolve(reply);
    };
    const crash = (error: unknown): void => settle({ fault: crashFault(error), poisoned: true });
    const late = (): void => settle({ fault: timeFault(run.limits), poisoned: true });
    const timer = setTimeout(late, run.limits.milliseconds + GRACE_MILLISECONDS);
    thread.on('message', settle).on('error', crash).on('exit', crash);
    thread.postMessage(run);
  });
}

function crashFault(error: unknown) {
  const message = `expected generate.js to run, but it ended its thread (${String(error)}); build a smaller model`;
  return { code: 'generator-failed', message } as const;
}
