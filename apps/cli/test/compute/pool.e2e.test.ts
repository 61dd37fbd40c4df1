import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { ThalwegError } from '@thalweg/core';
import { build } from 'esbuild';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { createPool, type Pool, type PoolOptions } from '../../src/compute/pool.js';
import type { TEST_TASKS } from './test-tasks.js';

let folder: string;
let worker: URL;
let pool: Pool<typeof TEST_TASKS> | null = null;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-pool-'));
  const outfile = join(folder, 'test-worker.mjs');
  await build({
    entryPoints: [fileURLToPath(new URL('./test-worker.ts', import.meta.url))],
    outfile,
    bundle: true,
    format: 'esm',
    platform: 'node',
    conditions: ['source'],
  });
  worker = pathToFileURL(outfile);
});

afterEach(async () => {
  await pool?.close();
  pool = null;
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

function start(options: Partial<PoolOptions> = {}) {
  const signal = new AbortController().signal;
  pool = createPool<typeof TEST_TASKS>({ worker, threads: 2, timeLimit: null, signal, ...options });
  return pool;
}

const done = (result: unknown) => ({ done: true, result });

test.each([1, 2, 5])('results stand in the order of the inputs on %i threads', async (threads) => {
  const inputs = [60, 40, 20, 5, 0].map((milliseconds, x) => ({ x, milliseconds }));
  expect(await start({ threads }).run('slowSquare', inputs)).toEqual([0, 1, 4, 9, 16].map(done));
});

test('the number of tasks done so far reaches the caller', async () => {
  const heard: number[] = [];
  const inputs = [30, 20, 10].map((milliseconds, x) => ({ x, milliseconds }));
  await start({ threads: 1 }).run('slowSquare', inputs, (count) => heard.push(count));
  expect(heard).toEqual([1, 2, 3]);
});

test('no input, no thread, no result', async () => {
  expect(await start().run('square', [])).toEqual([]);
});

test('threads are kept between runs and never exceed the number asked for', async () => {
  const current = start({ threads: 2 });
  const ids = new Set<unknown>();
  for (const inputs of [
    [null, null, null, null],
    [null, null, null],
  ]) {
    for (const outcome of await current.run('threadOf', inputs)) ids.add(outcome.done && outcome.result);
  }
  expect(ids.size).toBeGreaterThan(0);
  expect(ids.size).toBeLessThanOrEqual(2);
});

test.each([1, 2, 3])('of several failures the first in order is thrown on %i threads', async (threads) => {
  const inputs = [
    { message: 'first', milliseconds: 80 },
    { message: 'second', milliseconds: 0 },
    { message: 'third', milliseconds: 40 },
  ];
  const error: unknown = await start({ threads })
    .run('fail', inputs)
    .catch((reason: unknown) => reason);
  expect(error).toBeInstanceOf(ThalwegError);
  expect(error).toMatchObject({
    code: 'not-hermitian',
    message: 'first',
    pointer: '/state',
    details: { residual: 0.5 },
  });
});

test('a fault of a task arrives as an error that is no ThalwegError', async () => {
  const error: unknown = await start()
    .run('crash', [null])
    .catch((reason: unknown) => reason);
  expect(error).toBeInstanceOf(Error);
  expect(error).not.toBeInstanceOf(ThalwegError);
  expect(error).toMatchObject({ message: 'a fault of the task', stack: expect.stringContaining('test-worker') });
});

test('a thread that ends by itself fails its task instead of hanging', async () => {
  await expect(start().run('exit', [null])).rejects.toThrow('a thread ended by itself with exit code 3');
});

test('the pool works on after a failure', async () => {
  const current = start();
  await expect(current.run('crash', [null])).rejects.toThrow('a fault of the task');
  expect(await current.run('square', [3])).toEqual([done(9)]);
});

test('an interrupt ends a task that never looks up', async () => {
  const interruption = new AbortController();
  const running = start({ signal: interruption.signal }).run('spin', [null, null, null]);
  const begin = performance.now();
  setTimeout(() => interruption.abort(), 150);
  await expect(running).rejects.toMatchObject({ code: 'interrupted' });
  expect(performance.now() - begin).toBeLessThan(1000);
});

test('an interrupt before the start keeps every task from starting', async () => {
  await expect(start({ signal: AbortSignal.abort() }).run('spin', [null])).rejects.toMatchObject({
    code: 'interrupted',
  });
});

test('at the time limit a task may return what it has', async () => {
  expect(await start({ timeLimit: 200 }).run('untilTheLimit', [null, null])).toEqual([
    done('best so far'),
    done('best so far'),
  ]);
});

test('a task that ignores the time limit is ended; those after it never start', async () => {
  const current = start({ timeLimit: 50, threads: 1 });
  expect(await current.run('spin', [null, null])).toEqual([{ done: false }, { done: false }]);
});

test('progress of a task reaches the caller', async () => {
  const heard: string[] = [];
  await start({ progress: (text) => heard.push(text) }).run('talk', ['search']);
  expect(heard).toEqual(['search begins']);
});
