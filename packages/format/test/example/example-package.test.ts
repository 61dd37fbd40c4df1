import { expect, test } from 'vitest';
import { readExample } from '../../src/example/example-package.js';
import { parseClaims } from '../../src/schema/parse-document.js';
import { caughtError, refusal } from '../support/caught-error.js';
import { exampleDocument, exampleFiles } from '../support/example-files.js';

test('a package is read from its files', () => {
  const found = readExample(exampleFiles({ 'evidence/gap.json': '{}' }));
  expect(found.document).toEqual(exampleDocument());
  expect(found).toMatchObject({ generator: 'export default () => ({});\n', notes: '# Notes\n', recorded: null });
});

test.each<[string, Record<string, string | Uint8Array | null>, string, string]>([
  [
    'a file is missing',
    { 'generate.js': null },
    'bad-file',
    'expected the file generate.js in an example package, got none',
  ],
  ['a file is empty', { LICENSE: '' }, 'bad-file', 'expected a text in LICENSE, got an empty file'],
  ['a file is out of place', { 'notes.txt': 'x' }, 'bad-file', 'got notes.txt; move it into evidence'],
  ['text is not UTF-8', { 'NOTES.md': new Uint8Array([0xff, 0xfe]) }, 'bad-file', 'UTF-8 text in NOTES.md'],
  ['the document is no JSON', { 'example.json': '{' }, 'not-json', 'got the end of the text'],
  ['names collide', { 'evidence/A.json': '1', 'evidence/a.json': '2' }, 'bad-file', 'differ on every system'],
  [
    'a record is none',
    { 'evidence/showcase.json': '{"schema":"thalweg.sheet/1"}' },
    'wrong-schema',
    '"thalweg.showcase/1"',
  ],
])('refused: %s', (_title, changes, code, says) => {
  const [foundCode, , message] = refusal(() => readExample(exampleFiles(changes)));
  expect(foundCode).toBe(code);
  expect(message).toContain(says);
});

test('an error names the file it is in', () => {
  const files = exampleFiles({ 'example.json': JSON.stringify(exampleDocument({ version: '1' })) });
  expect(caughtError(() => readExample(files))).toMatchObject({
    pointer: '/version',
    details: { document: 'example.json' },
  });
});

const claim = { constant: 'gap', relation: 'equals', value: 1, source: 'by hand' };

test('claims are read', () => {
  const claims = [claim, { ...claim, relation: 'tends-to', along: 'n', convention: 'one-alpha' }];
  expect(parseClaims(JSON.stringify(claims))).toEqual(claims);
});

test.each<[unknown, string, string]>([
  [[{ ...claim, constant: 'entropy' }], '/0/constant', 'one of "gap"'],
  [[{ ...claim, source: '' }], '/0/source', 'at least 1 character'],
  [[{ ...claim, relation: 'below' }], '/0/relation', '"at-least"'],
  [[claim, { ...claim, relation: 'tends-to' }], '/1/along', 'the parameter that grows'],
  [[{ ...claim, along: 'n' }], '/0/along', 'beside "tends-to" only'],
  [[{ ...claim, mean: 'left' }], '/0/mean', 'only ge has one'],
  [{}, '', 'a list'],
])('refuses the claims %j', (claims, pointer, says) => {
  const [, foundPointer, message] = refusal(() => parseClaims(JSON.stringify(claims)));
  expect(foundPointer).toBe(pointer);
  expect(message).toContain(says);
});
