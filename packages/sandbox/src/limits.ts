import { ThalwegError } from '@thalweg/core';

/** What one run of a generator may use. */
export interface SandboxLimits {
  /** Wall-clock time of the run, from 1 to 600,000. */
  readonly milliseconds: number;
  /** Memory of the interpreter with everything the generator holds, from 16 to 1024 MiB. */
  readonly memoryMegabytes: number;
  /** UTF-8 bytes of the returned JSON text, from 1 to 64 MiB. */
  readonly outputBytes: number;
}

export const DEFAULT_LIMITS: SandboxLimits = { milliseconds: 10_000, memoryMegabytes: 256, outputBytes: 2 ** 24 };

/** Least and most of each limit. */
const RANGES: Readonly<Record<keyof SandboxLimits, readonly [number, number]>> = {
  milliseconds: [1, 600_000],
  memoryMegabytes: [16, 1024],
  outputBytes: [1, 2 ** 26],
};

/** Source text of a generator, UTF-16 units. */
export const SOURCE_LIMIT = 2 ** 20;

/** Nesting of arrays and objects of what a generator returns, that of a document. */
export const DEPTH_LIMIT = 64;

/** UTF-16 units of a message that comes from inside. */
export const MESSAGE_LIMIT = 1_000;

/** Stack of the interpreter in bytes, small enough that the host's own never runs out first; the same everywhere, since a generator can measure it. */
export const STACK_BYTES = 48 * 1024;

/** Stack of the thread that holds the interpreter, in MB. */
export const THREAD_STACK_MEGABYTES = 16;

/** Heap of the sandbox's process in MB; the memory of the interpreter is not part of it. */
export const PROCESS_HEAP_MEGABYTES = 256;

/** A new process must be ready within this time. */
export const START_MILLISECONDS = 30_000;

/** The interpreter stops itself at its deadline; its thread is ended this much later, its process twice as much later. */
export const GRACE_MILLISECONDS = 750;

/** The limits with what was left out filled in. Throws `usage` for one that is out of range. */
export function completeLimits(limits: Partial<SandboxLimits> = {}): SandboxLimits {
  const complete = { ...DEFAULT_LIMITS, ...limits };
  for (const [name, [least, most]] of Object.entries(RANGES) as [keyof SandboxLimits, [number, number]][]) {
    const value: unknown = complete[name];
    if (Number.isInteger(value) && (value as number) >= least && (value as number) <= most) continue;
    const message = `expected the limit ${name} to be a whole number from ${least} to ${most}, got ${String(value)}; correct it`;
    throw new ThalwegError('usage', message);
  }
  return complete;
}
