import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { cruise, type ICruiseResult, type IViolation } from 'dependency-cruiser';
import extractConfiguration from 'dependency-cruiser/config-utl/extract-depcruise-config';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { readText, root } from './helpers/repository.js';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-imports-'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

async function violations(baseDir: string): Promise<string[]> {
  const { options, ...ruleSet } = await extractConfiguration(join(root, '.dependency-cruiser.mjs'));
  const cruiseOptions = { ...options, ruleSet, validate: true, baseDir };
  const { output } = await cruise(['packages', 'apps'], cruiseOptions, options?.enhancedResolveOptions);
  return (output as ICruiseResult).summary.violations.map(describe).sort();
}

function describe({ rule, from, to }: IViolation): string {
  return `${rule.name}: ${from} -> ${to}`;
}

/** A tree that keeps every rule, with these files put over it. */
async function violationsWith(files: Record<string, string>): Promise<string[]> {
  const tree: Record<string, string> = {
    'packages/core/src/index.ts': "export * from './matrix.js';",
    'packages/core/src/matrix.ts': 'export const one = 1;',
    'packages/format/src/index.ts': "export * from './model.js';",
    'packages/format/src/model.ts': "export { one } from '../../core/src/index.js';",
    'apps/cli/src/bin.ts': "export * from '../../../packages/format/src/index.js';\nimport 'node:fs';",
    'apps/web/src/main.ts': 'export const page = 1;',
    ...files,
  };
  for (const [path, text] of Object.entries(tree)) {
    mkdirSync(join(folder, dirname(path)), { recursive: true });
    writeFileSync(join(folder, path), text);
  }
  return violations(folder);
}

test('the project keeps every rule', async () => {
  expect(await violations(root)).toEqual([]);
});

test('a tree that keeps the rules passes them', async () => {
  expect(await violationsWith({})).toEqual([]);
});

test.each([
  [
    'core imports a module of Node.js',
    'packages/core/src/matrix.ts',
    "import 'node:fs';",
    'core-imports-only-itself-and-ml-matrix',
  ],
  [
    'core imports another package',
    'packages/core/src/matrix.ts',
    "import 'zod';",
    'core-imports-only-itself-and-ml-matrix',
  ],
  [
    'core imports format',
    'packages/core/src/matrix.ts',
    "export * from '../../format/src/index.js';",
    'core-imports-only-itself-and-ml-matrix',
  ],
  [
    'format imports the command line',
    'packages/format/src/model.ts',
    "export * from '../../../apps/cli/src/bin.js';",
    'format-imports-only-core',
  ],
  [
    'the sandbox imports format',
    'packages/sandbox/src/index.ts',
    "export * from '../../format/src/index.js';",
    'sandbox-imports-only-core',
  ],
  [
    'an app imports another',
    'apps/cli/src/bin.ts',
    "export * from '../../web/src/main.js';",
    'apps-never-import-each-other',
  ],
  [
    'an app imports an internal of a package',
    'apps/cli/src/bin.ts',
    "export * from '../../../packages/core/src/matrix.js';",
    'other-packages-through-their-index',
  ],
  [
    'the checker imports a solver',
    'packages/core/src/checker/check-certificate.ts',
    "export { one } from '../matrix.js';",
    'checker-stands-alone',
  ],
  ['two modules import each other', 'packages/core/src/matrix.ts', "export { one } from './index.js';", 'no-cycles'],
  ['an import leads nowhere', 'packages/core/src/matrix.ts', "export * from './nowhere.js';", 'everything-resolves'],
])('%s: refused', async (_title, path, text, rule) => {
  expect((await violationsWith({ [path]: text })).map((violation) => violation.split(':')[0])).toContain(rule);
});

test('core compiles without the DOM and without the types of Node.js', () => {
  const base = JSON.parse(readText('tsconfig.base.json')).compilerOptions;
  const core = JSON.parse(readText('packages/core/tsconfig.json')).compilerOptions;
  const { lib, types } = { ...base, ...core };
  expect(lib).toEqual(['ES2023']);
  expect(types).toEqual([]);
});
