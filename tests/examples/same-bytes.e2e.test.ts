import { digestModel, parseClaims, parseModel, resolveModel } from '@thalweg/format';
import { createNodeSha256 } from '@thalweg/format/node';
import { createSandbox, type Sandbox } from '@thalweg/sandbox/node';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { bundledExamples, readBundled, showcaseOf } from './support/bundled.js';

let sandboxes: Sandbox[];

beforeAll(async () => {
  await ensureBundle();
  sandboxes = [createSandbox(), createSandbox()];
});

afterAll(() => {
  for (const sandbox of sandboxes) sandbox.close();
});

test.each(bundledExamples())('%s: two processes build the same bytes', async (name) => {
  const example = readBundled(name);
  const points = showcaseOf(example);
  const build = (sandbox: Sandbox, want: 'model' | 'claims') =>
    Promise.all(points.map((parameters) => sandbox.run({ source: example.generator, parameters, want })));
  const [first = [], second] = await Promise.all(sandboxes.map((sandbox) => build(sandbox, 'model')));
  expect(second).toEqual(first);
  const digests = first.map(({ json }) => digestModel(resolveModel(parseModel(json)), createNodeSha256));
  expect(example.recorded?.points.map(({ sheet }) => sheet.model.digest)).toEqual(digests);
  expect(new Set(digests).size).toBe(points.length);

  const [claims = [], again] = await Promise.all(sandboxes.map((sandbox) => build(sandbox, 'claims')));
  expect(again).toEqual(claims);
  const claimed = claims.flatMap(({ json }) => parseClaims(json));
  expect(claimed.length).toBeGreaterThan(0);
});
