import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

/** One run of something by the clock, in seconds. */
export interface Timing {
  readonly seconds: number;
}

/** A timed computation with its result and, where it is known, the most that its process held, in MiB. */
export interface Outcome extends Timing {
  readonly value: number;
  readonly mebibytes?: number;
}

/** Time a computation on this thread. */
export function timed(run: () => number): Outcome {
  const start = process.hrtime.bigint();
  const value = run();
  const seconds = Number(process.hrtime.bigint() - start) / 1e9;
  return { value, seconds, mebibytes: process.resourceUsage().maxRSS / 1024 };
}

/** The quickest of several runs: on a busy machine the only stable figure. */
export function least<T extends Timing>(runs: readonly T[]): T {
  return runs.reduce((best, run) => (run.seconds < best.seconds ? run : best));
}

/** The run in the middle by the clock. */
export function median<T extends Timing>(runs: readonly T[]): T {
  return [...runs].sort((a, b) => a.seconds - b.seconds)[Math.floor(runs.length / 2)] as T;
}

/** Run this very script again in a process of its own with the given words; it prints its outcome as JSON. */
export function inOwnProcess<T>(...words: string[]): T {
  return JSON.parse(output(process.execPath, [process.argv[1] as string, ...words], {})) as T;
}

/** One run of a rival of tests/bench, one thread of OpenBLAS, with more of the environment when given. */
export function runRival(program: string, words: readonly number[], env: Record<string, string> = {}): Outcome {
  const path = join('tests', 'bench', program);
  const answer = output('/usr/bin/python3', [path, ...words.map(String)], { OPENBLAS_NUM_THREADS: '1', ...env });
  return JSON.parse(answer) as Outcome;
}

/** A command as a shell runs it, cold: seconds by the clock, and of all its threads on the processors; its output is dropped. */
export function runCold(command: readonly string[]): Timing & { readonly processor: number } {
  const script = 'TIMEFORMAT="%R %U %S"; time "$@" > /dev/null';
  const { status, stderr } = spawnSync('bash', ['-c', script, 'bash', ...command], { encoding: 'utf8' });
  const [real, user, system] = (stderr.trim().split('\n').at(-1) ?? '').split(' ').map(Number);
  if (status !== 0 || real === undefined || user === undefined || system === undefined) {
    throw new Error(`expected ${command.join(' ')} to succeed, got status ${status}:\n${stderr}`);
  }
  return { seconds: real, processor: user + system };
}

function output(program: string, words: readonly string[], env: Record<string, string>): string {
  const run = spawnSync(program, words, { encoding: 'utf8', env: { ...process.env, ...env } });
  if (run.status === 0) return run.stdout;
  const reason = run.error?.message ?? `status ${run.status}`;
  throw new Error(`expected ${program} ${words.join(' ')} to succeed, got ${reason}:\n${run.stderr}`);
}
