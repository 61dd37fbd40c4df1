import { readFileSync } from 'node:fs';
import { analyse } from '@thalweg/core';
import { loadModel } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { kit } from '../../src/kit/index.js';
import { createSandbox, type Sandbox } from '../../src/node/index.js';
import { ensureScripts } from '../support/ensure-scripts.js';

const document = readFileSync(new URL('../../KIT.md', import.meta.url), 'utf8');
const snippets = [...document.matchAll(/^```js\n(.*?)^```$/gms)].map(([, source]) => source);
const parameters = { n: 3, beta: 0.8, g: 0.5, seed: 7 };

let sandbox: Sandbox;

beforeAll(() => {
  ensureScripts();
  sandbox = createSandbox();
});

afterAll(() => {
  sandbox?.close();
});

test('the document names every function of the kit, and no other', () => {
  const named = new Set([...document.matchAll(/`(\w+)(?:\([^`]*\))?`/g)].map(([, name]) => name));
  const used = new Set([...document.matchAll(/\bkit\.(\w+)/g)].map(([, name]) => name));
  const functions = Object.keys(kit);
  expect(functions.filter((name) => !named.has(name) && !used.has(name))).toEqual([]);
  expect([...used].filter((name) => !functions.includes(name))).toEqual([]);
  expect(document).toContain(`\`kit.version\` is \`${kit.version}\``);
});

test.each(snippets.map((source, k) => [k + 1, source]))(
  'snippet %i gives a model of a Markov semigroup',
  async (_number, source) => {
    const { json } = await sandbox.run({ source, parameters, want: 'model' });
    const { markov } = analyse(loadModel(json).generator);
    expect(markov.unital.holds && markov.hermitian.holds && markov.completelyPositive.holds).toBe(true);
    const claims = JSON.parse((await sandbox.run({ source, parameters, want: 'claims' })).json);
    expect(Array.isArray(claims)).toBe(true);
  },
);

test('there are snippets for every section', () => {
  expect(snippets.length).toBeGreaterThanOrEqual((document.match(/^## /gm) ?? []).length);
});
