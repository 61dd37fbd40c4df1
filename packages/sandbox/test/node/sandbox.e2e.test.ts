import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { ensureScripts } from '../support/ensure-scripts.js';
import { createSandbox, type Sandbox } from '../../src/node/index.js';

const RUNS = 200;
/** Resident memory may move by this much between the 50th and the last run, in MiB: less than ten interpreters of 16 MiB. */
const MOVEMENT = 150;
/** Processor time of a run on a warm process, ms; the figure promised is that of wall time on an idle machine. */
const OVERHEAD = 60;

const identity = {
  source: 'export default ({ n }, kit) => kit.identity(n);',
  parameters: { n: 2 },
  want: 'model',
} as const;

let sandbox: Sandbox;

beforeAll(() => {
  ensureScripts();
  sandbox = createSandbox();
});

afterAll(() => {
  sandbox?.close();
});

/** The child of this process that runs the sandbox, by what Linux says. */
function findSandboxProcess(): number {
  const children = readFileSync(`/proc/${process.pid}/task/${process.pid}/children`, 'utf8').trim().split(' ');
  const found = children.find((pid) => readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('sandbox-process'));
  if (found === undefined) throw new Error('expected a process of the sandbox');
  return Number(found);
}

function measure(): { residentMegabytes: number; processorMilliseconds: number } {
  const pid = findSandboxProcess();
  const pages = Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1]);
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1].split(' ');
  return { residentMegabytes: pages / 256, processorMilliseconds: 10 * (Number(fields[11]) + Number(fields[12])) };
}

test('memory stays flat and a run stays cheap over many runs in one process', async () => {
  for (let k = 0; k < 50; k++) await sandbox.run(identity);
  const before = measure();
  for (let k = 50; k < RUNS; k++) await sandbox.run(identity);
  const after = measure();
  expect(after.residentMegabytes - before.residentMegabytes).toBeLessThan(MOVEMENT);
  expect((after.processorMilliseconds - before.processorMilliseconds) / (RUNS - 50)).toBeLessThan(OVERHEAD);
});

test('the process of the sandbox has no environment and may read no file but its script', async () => {
  await sandbox.run(identity);
  const found = findSandboxProcess();
  expect(readFileSync(`/proc/${found}/environ`, 'utf8')).toBe('');
  const options = readFileSync(`/proc/${found}/cmdline`, 'utf8').split('\0').slice(1);
  expect(options).toContain('--max-old-space-size=256');
  expect(options.filter((option) => option.includes('permission'))).toHaveLength(1);
  expect(options.filter((option) => option.startsWith('--allow'))).toEqual([
    expect.stringMatching(/^--allow-fs-read=.*sandbox-process\.js$/),
    '--allow-worker',
  ]);
});

test('runs wait for a free process and all come to their own end', async () => {
  const two = createSandbox({ processes: 2 });
  const sources = [2, 3, 4, 5].map((n) => ({ ...identity, parameters: { n } }));
  const sizes = await Promise.all(sources.map(async (run) => JSON.parse((await two.run(run)).json).shape[0]));
  expect(sizes).toEqual([2, 3, 4, 5]);
  two.close();
  await expect(two.run(identity)).rejects.toMatchObject({ code: 'interrupted' });
});

test('a run is ended when the sandbox is closed', async () => {
  const other = createSandbox();
  const endless = other.run({ source: 'for (;;);', parameters: {}, want: 'model' });
  const waiting = other.run(identity);
  setTimeout(() => other.close(), 200);
  await expect(endless).rejects.toMatchObject({ code: 'interrupted' });
  await expect(waiting).rejects.toMatchObject({ code: 'interrupted' });
});

test.each<[object, string]>([
  [
    { limits: { memoryMegabytes: 8 } },
    'expected the limit memoryMegabytes to be a whole number from 16 to 1024, got 8',
  ],
  [{ limits: { milliseconds: 0 } }, 'expected the limit milliseconds to be a whole number from 1 to 600000, got 0'],
  [{ parameters: { n: NaN } }, 'expected the parameter "n" to be a finite number, a text, true or false, got NaN'],
  [{ want: 'all' }, 'expected "model" or "claims" to be wanted, got all'],
])('a run that cannot be meant is refused before it starts: %j', async (change, message) => {
  await expect(sandbox.run({ ...identity, ...change })).rejects.toMatchObject({
    code: 'usage',
    message: expect.stringContaining(message),
  });
});

test('the least memory is enough for a small model', async () => {
  const { json } = await sandbox.run({ ...identity, limits: { memoryMegabytes: 16 } });
  expect(json).toContain('[1,1,1,0]');
});
