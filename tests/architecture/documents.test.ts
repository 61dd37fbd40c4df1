import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { readText, root } from './helpers/repository.js';

const DOCUMENTS = ['README.md', 'DEVELOPERS.md'];
const FOLDERS = 'packages|apps|migrations|tests|examples';

/** Paths that a document names: anything below our folders, and the targets of relative links. */
function namedPaths(text: string): string[] {
  const inText = text.matchAll(new RegExp(`(?<![\\w./-])(?:${FOLDERS})/[\\w./@-]*`, 'g'));
  const links = text.matchAll(/\]\((?!https?:|mailto:|#)([^)#\s]+)[^)]*\)/g);
  const paths = [...[...inText].map((match) => match[0]), ...[...links].map((match) => match[1] ?? '')];
  return [...new Set(paths.map((path) => path.replace(/[.,/]+$/, '')))].filter((path) => !isGenerated(path)).sort();
}

function isGenerated(path: string): boolean {
  return /(^|\/)(node_modules|dist)(\/|$)/.test(path);
}

test.each(DOCUMENTS)('every path that %s names exists', (document) => {
  const missing = namedPaths(readText(document)).filter((path) => !existsSync(join(root, path)));
  expect(missing).toEqual([]);
});

test.each(DOCUMENTS)('every npm script that %s names exists', (document) => {
  const { scripts } = JSON.parse(readText('package.json'));
  const named = [...readText(document).matchAll(/\bnpm (?:run ([\w:-]+)|(start|test)\b)/g)].map((m) => m[1] ?? m[2]);
  expect(named.filter((name) => !Object.hasOwn(scripts, name ?? ''))).toEqual([]);
});

test('finds paths in text, code and links, and leaves addresses alone', () => {
  const text =
    'See `packages/core/src`, tests/bench/. [a](LICENSE) [b](https://x.org/packages/y) examples/models/a.json, apps/cli/dist/x.js';
  expect(namedPaths(text)).toEqual(['LICENSE', 'examples/models/a.json', 'packages/core/src', 'tests/bench']);
});
