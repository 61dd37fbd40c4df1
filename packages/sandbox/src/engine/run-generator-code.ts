import {
  newQuickJSWASMModuleFromVariant,
  newVariant,
  type QuickJSContext,
  type QuickJSHandle,
  type QuickJSRuntime,
  type QuickJSSyncVariant,
} from 'quickjs-emscripten-core';
import imported from '@jitl/quickjs-wasmfile-release-sync';
import type { CompleteRun } from '../generator-run.js';
import { DEPTH_LIMIT, STACK_BYTES } from '../limits.js';
import type { RunReply } from '../reply.js';
import { CappedMemory } from './capped-memory.js';
import { memoryFault, readAnswer, timeFault } from './faults.js';

/** What the interpreter is made of. */
export interface Engine {
  readonly wasm: WebAssembly.Module;
  /** Module that exports the function `generate` of `inside`. */
  readonly inside: string;
  /** Milliseconds on any clock that only goes forward. */
  readonly now: () => number;
}

/**
 * Language features inside: no Date. Eval is needed to load the generator at all; what it reaches is inside, too.
 */
const INTRINSICS = {
  BaseObjects: true,
  Date: false,
  Eval: true,
  StringNormalize: true,
  RegExp: true,
  RegExpCompiler: true,
  JSON: true,
  Proxy: true,
  MapSet: true,
  TypedArrays: true,
  Promise: true,
  BigInt: true,
};

/** The package's types speak of its CommonJS form, where the variant is one level deeper. */
const variant: QuickJSSyncVariant = 'default' in imported ? imported.default : imported;

/**
 * Runs one generator in an interpreter of its own: a fresh instance of the WebAssembly module with a memory that cannot grow
 * beyond its limit. `QuickJSRuntime.setMemoryLimit` alone does not hold. Whatever the host itself throws poisons the thread.
 */
export async function runGeneratorCode(engine: Engine, run: CompleteRun): Promise<RunReply> {
  const deadline = engine.now() + run.limits.milliseconds;
  let late = false;
  try {
    const memory = new CappedMemory(run.limits.memoryMegabytes);
    const runtime = await freshRuntime(engine, memory);
    runtime.setInterruptHandler(() => (late ||= engine.now() > deadline));
    const answer = evaluate(runtime, engine, run);
    if (late) return { fault: timeFault(run.limits) };
    return readAnswer(answer, run.limits, memory.exhausted);
  } catch (error) {
    return { fault: late ? timeFault(run.limits) : hostFault(error, run), poisoned: true };
  }
}

async function freshRuntime(engine: Engine, wasmMemory: WebAssembly.Memory): Promise<QuickJSRuntime> {
  const quickjs = await newQuickJSWASMModuleFromVariant(newVariant(variant, { wasmModule: engine.wasm, wasmMemory }));
  const runtime = quickjs.newRuntime();
  runtime.setMaxStackSize(STACK_BYTES);
  runtime.setModuleLoader(
    (name) => ({
      error: new Error(`generate.js ${name}: a generator imports nothing, take what it needs from the kit`),
    }),
    // Under another name, so that modules that are loaded already are not found either.
    (_from, name) => `imports "${name}"`,
  );
  return runtime;
}

/** The answer of `generate`; null when the interpreter was stopped or ran out of memory. The instance is dropped as a whole. */
function evaluate(runtime: QuickJSRuntime, engine: Engine, run: CompleteRun): string | null {
  const context = runtime.newContext({ intrinsics: INTRINSICS });
  const prepared = context.evalCode(engine.inside, 'kit.js', { type: 'module', strict: true });
  if (prepared.error) return null;
  const generate = context.getProp(prepared.value, 'generate');
  const loaded = load(context, run.source);
  const wanted = [run.want, run.parameters].map((text) => context.newString(text));
  const answer = context.callFunction(generate, context.undefined, loaded, ...wanted, context.newNumber(DEPTH_LIMIT));
  return answer.error ? null : context.getString(answer.value);
}

function load(context: QuickJSContext, source: string): QuickJSHandle {
  const loaded = context.newObject();
  const module = context.evalCode(source, 'generate.js', { type: 'module', strict: true });
  if (module.error) context.setProp(loaded, 'thrown', module.error);
  else context.setProp(loaded, 'module', module.value);
  return loaded;
}

function hostFault(error: unknown, { limits }: CompleteRun) {
  const text = String(error);
  if (/memory|OOM|abort/i.test(text)) return memoryFault(limits);
  if (/call stack/i.test(text)) {
    const overflow =
      'generate.js: stack overflow outside the interpreter; make it simpler: less nesting, less recursion';
    return { code: 'generator-failed', message: overflow } as const;
  }
  const message = `expected generate.js to run, but it overran the interpreter (${text}); make it simpler: less nesting, less recursion`;
  return { code: 'generator-failed', message } as const;
}
