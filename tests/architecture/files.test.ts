import { readdirSync } from 'node:fs';
import { basename } from 'node:path';
import { expect, test } from 'vitest';
import { listCode, readText, root } from './helpers/repository.js';

const LONGEST_FILE = 400;

/** What may stand at the top: documents, the two manifests, folders, licence, lock file, tool configuration. */
const TOP = new Set([
  ...[
    'README.md',
    'DEVELOPERS.md',
    'LICENSE',
    'package.json',
    'package-lock.json',
    'tsconfig.json',
    'tsconfig.base.json',
  ],
  ...['packages', 'apps', 'migrations', 'tests', 'examples'],
  ...['.ci', '.git', '.gitattributes', '.gitignore', '.editorconfig', '.npmrc', '.prettierrc', '.prettierignore'],
  ...['.dependency-cruiser.mjs', 'eslint.config.mjs', 'knip.json', 'vitest.config.ts', 'node_modules'],
]);

const KEBAB_CASE = /^[a-z0-9]+(-[a-z0-9]+)*(\.(test|e2e\.test|db\.test|bench|config|d))?\.([cm]?[jt]sx?)$/;
const SNAKE_CASE = /^_{0,2}[a-z0-9]+(_[a-z0-9]+)*_{0,2}\.py$/;
const SPAWNS = /from '(node:)?(child_process|worker_threads|execa|pg)'/;

test(`no file is longer than ${LONGEST_FILE} lines`, () => {
  const long = listCode().flatMap((path) => {
    const lines = readText(path).split('\n').length - 1;
    return lines > LONGEST_FILE ? [`${path}: ${lines} lines`] : [];
  });
  expect(long).toEqual([]);
});

test('files are named in kebab-case, Python modules in snake_case', () => {
  const names = listCode().filter((path) => !(path.endsWith('.py') ? SNAKE_CASE : KEBAB_CASE).test(basename(path)));
  expect(names).toEqual([]);
});

test('nothing else stands at the top', () => {
  expect(readdirSync(root).filter((name) => !TOP.has(name))).toEqual([]);
});

test('a test that starts processes or threads says so in its name', () => {
  const pure = listCode().filter((path) => path.endsWith('.test.ts') && !/\.(e2e|db)\.test\.ts$/.test(path));
  expect(pure.length).toBeGreaterThan(0);
  expect(pure.filter((path) => SPAWNS.test(readText(path)))).toEqual([]);
});

test('every test file can fail', () => {
  const tests = listCode().filter((path) => /\.test\.(ts|tsx|mjs)$/.test(path));
  expect(tests.filter((path) => !/\bexpect\w*\(|\bassert\w*\(/.test(readText(path)))).toEqual([]);
});
