import { readFileSync } from 'node:fs';
import { loadModel, parseClaims } from '@thalweg/format';
import { createSandbox, type Sandbox } from '@thalweg/sandbox/node';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { bundledExamples, folderOf, readBundled, showcaseOf } from './support/bundled.js';

interface Row {
  readonly name: string;
  /** Smallest and largest dimension of the algebra. */
  readonly dimensions: readonly [number, number];
  readonly claims: string;
}

const rows: Row[] = readFileSync(folderOf('README.md'), 'utf8')
  .split('\n')
  .filter((line) => line.startsWith('| ['))
  .map((line) => {
    const [, link = '', , range = '', claims = ''] = line.split('|').map((cell) => cell.trim());
    const [least, most = least] = range.split('–').map(Number);
    return { name: /^\[(.+)\]\(\1\)$/.exec(link)?.[1] ?? '', dimensions: [least ?? NaN, most ?? NaN], claims };
  });

let sandbox: Sandbox;

beforeAll(async () => {
  await ensureBundle();
  sandbox = createSandbox();
});

afterAll(() => {
  sandbox.close();
});

test('the table names every example once, in order', () => {
  expect(rows.map(({ name }) => name)).toEqual(bundledExamples());
  expect(rows.length).toBeGreaterThanOrEqual(16);
});

test.each(rows)('the row of $name tells its dimensions and claims', async ({ name, dimensions, claims }) => {
  const example = readBundled(name);
  const symbols = new Map<string, Set<string>>();
  for (const parameters of showcaseOf(example)) {
    const run = { source: example.generator, parameters };
    const model = await sandbox.run({ ...run, want: 'model' });
    const { dimension } = loadModel(model.json).generator.algebra;
    expect(dimension).toBeGreaterThanOrEqual(dimensions[0]);
    expect(dimension).toBeLessThanOrEqual(dimensions[1]);
    for (const { constant, relation } of parseClaims((await sandbox.run({ ...run, want: 'claims' })).json)) {
      symbols.set(constant, (symbols.get(constant) ?? new Set()).add(SYMBOLS[relation]));
    }
  }
  const cells = [...symbols].map(
    ([constant, found]) => `\`${constant}\` ${ORDER.filter((s) => found.has(s)).join(' or ')}`,
  );
  expect(claims.split(', ').sort()).toEqual(cells.sort());
});

const SYMBOLS = { 'at-least': '≥', 'at-most': '≤', equals: '=', 'tends-to': '→' } as const;

const ORDER = Object.values(SYMBOLS);
