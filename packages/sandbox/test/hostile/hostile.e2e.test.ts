import { afterAll, beforeAll, expect, test } from 'vitest';
import { ensureScripts } from '../support/ensure-scripts.js';
import { createSandbox, type Sandbox } from '../../src/node/index.js';
import { CORPUS } from './corpus.js';

const GRACE_OF_THE_TEST = 20_000;
const HEALTHY = {
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

test('the corpus has at least thirty generators, each with its message', () => {
  expect(CORPUS.length).toBeGreaterThanOrEqual(30);
  expect(new Set(CORPUS.map(({ name }) => name)).size).toBe(CORPUS.length);
  expect(CORPUS.every(({ message }) => message.length > 8)).toBe(true);
});

test.each(CORPUS)('$name: refused, and the next run is healthy', async ({ source, code, message, pointer, limits }) => {
  const begin = performance.now();
  const error = await sandbox.run({ source, parameters: { n: 2 }, want: 'model', limits }).then(
    ({ json }) => json.slice(0, 200),
    (reason) => reason,
  );
  expect(error).toMatchObject({ code, ...(pointer !== undefined && { pointer }) });
  expect(error.message).toContain(message);
  expect(error.message).not.toMatch(/[\p{Cc}\u202e]/u);
  expect(error.message.length).toBeLessThan(1100);
  expect(performance.now() - begin).toBeLessThan((limits?.milliseconds ?? 10_000) + GRACE_OF_THE_TEST);
  expect(await sandbox.run(HEALTHY)).toEqual({ json: '{"shape":[2,2],"entries":[[0,0,1,0],[1,1,1,0]]}' });
});
