import { expect, test } from 'vitest';
import { isOrcid } from '../../src/example/orcid.js';
import { parseDocument, parseExample } from '../../src/schema/parse-document.js';
import { refusal } from '../support/caught-error.js';
import { exampleDocument } from '../support/example-files.js';

const parse = (changes: Record<string, unknown>) => parseExample(JSON.stringify(exampleDocument(changes)));

test('reads a document and tells it apart by its schema', () => {
  expect(parse({})).toEqual(exampleDocument());
  expect(parseDocument(JSON.stringify(exampleDocument()))).toEqual(exampleDocument());
});

const n = { name: 'n', type: 'integer', range: [2, 6], default: 2, meaning: 'points' };

test.each<[Record<string, unknown>, string, string, string]>([
  [{ name: 'Two_Rates' }, 'wrong-schema', '/name', 'a name of 2 to 64 characters a-z, 0-9'],
  [{ name: 'a--b' }, 'wrong-schema', '/name', 'single hyphens'],
  [{ version: '1.0' }, 'wrong-schema', '/version', 'SemVer 2.0.0'],
  [{ version: 'v1.0.0' }, 'wrong-schema', '/version', 'SemVer'],
  [{ version: '1.0.0+build' }, 'wrong-schema', '/version', 'without build metadata'],
  [{ version: '01.0.0' }, 'wrong-schema', '/version', 'SemVer'],
  [{ title: 'a\nb' }, 'wrong-schema', '/title', 'one line'],
  [{ summary: '' }, 'wrong-schema', '/summary', 'at least 1 character'],
  [{ licence: 'my own' }, 'wrong-schema', '/licence', 'SPDX licence expression such as MIT'],
  [{ licence: 'LicenseRef-mine' }, 'wrong-schema', '/licence', 'SPDX'],
  [{ authors: [] }, 'wrong-schema', '/authors', 'at least 1 item'],
  [{ authors: [{ name: 'A', orcid: '0000-0002-1825-0098' }] }, 'wrong-schema', '/authors/0/orcid', 'check digit'],
  [{ references: [{ doi: 'https://doi.org/10.1000/1' }] }, 'wrong-schema', '/references/0/doi', 'a bare DOI'],
  [{ references: [{ arxiv: '16090.1' }] }, 'wrong-schema', '/references/0/arxiv', 'an arXiv number'],
  [{ references: [{ isbn: '1' }] }, 'wrong-schema', '/references/0', '{"doi": "10.…"}'],
  [{ licenseText: 'x' }, 'unknown-field', '/licenseText', 'expected only the fields schema, name, version'],
  [{ parameters: [n, n], showcase: [{}] }, 'wrong-schema', '/parameters/1/name', 'each parameter once, got "n" again'],
  [{ parameters: [{ ...n, range: [6, 2] }] }, 'wrong-schema', '/parameters/0/range', '[smallest, largest], got [6, 2]'],
  [{ parameters: [{ ...n, default: 7 }] }, 'wrong-schema', '/parameters/0/default', 'a default from 2 to 6, got 7'],
  [{ parameters: [{ ...n, default: 2.5 }] }, 'wrong-schema', '/parameters/0/default', 'a whole number'],
  [{ parameters: [{ ...n, meaning: '' }] }, 'wrong-schema', '/parameters/0/meaning', 'at least 1 character'],
  [{ parameters: [{ ...n, name: '2n' }] }, 'wrong-schema', '/parameters/0/name', 'a letter first'],
  [{ parameters: [{ ...n, type: 'float' }] }, 'wrong-schema', '/parameters/0/type', 'integer'],
  [
    { parameters: [{ name: 'k', type: 'choice', choices: ['a', 'b'], default: 'c', meaning: 'm' }] },
    'wrong-schema',
    '/parameters/0/default',
    'one of the choices a, b, got "c"',
  ],
  [
    { parameters: [{ name: 'k', type: 'choice', choices: ['a', 'a'], default: 'a', meaning: 'm' }] },
    'wrong-schema',
    '/parameters/0/choices/1',
    'each choice once',
  ],
  [{ showcase: [] }, 'wrong-schema', '/showcase', 'at least 1 item'],
  [
    { showcase: [{ n: 3 }, { m: 3 }] },
    'wrong-schema',
    '/showcase/1/m',
    'one of the parameters n, g, kind, loops, got "m"',
  ],
  [{ showcase: [{ n: 2.5 }] }, 'wrong-schema', '/showcase/0/n', 'a whole number from 2 to 6 for n, got 2.5'],
  [{ showcase: [{ kind: 'star' }] }, 'wrong-schema', '/showcase/0/kind', 'one of ring, line for kind'],
  [{ showcase: [{ loops: 1 }] }, 'wrong-schema', '/showcase/0/loops', 'true or false for loops, got 1'],
])('refuses %j', (changes, code, pointer, says) => {
  const [foundCode, foundPointer, message] = refusal(() => parse(changes));
  expect([foundCode, foundPointer]).toEqual([code, pointer]);
  expect(message).toContain(says);
  expect(message).toMatch(/^expected .*, got .*; /s);
});

test.each(['MIT', 'CC-BY-4.0 OR Apache-2.0', 'GPL-2.0-or-later WITH Bison-exception-2.2'])(
  'takes the licence %s',
  (licence) => {
    expect(parse({ licence }).licence).toBe(licence);
  },
);

test.each(['1.0.0-rc.1', '0.0.1', '10.20.30'])('takes the version %s', (version) => {
  expect(parse({ version }).version).toBe(version);
});

/** The published samples of the ORCID iD structure page, the second with the check character X. */
test('ORCID iDs by ISO 7064, MOD 11-2', () => {
  expect(['0000-0002-1825-0097', '0000-0002-9079-593X', '0000-0001-5109-3700'].map(isOrcid)).toEqual([
    true,
    true,
    true,
  ]);
  expect(['0000-0002-1825-0079', '0000-0002-9079-5930', '0000-0002-1825-009', '0000000218250097'].map(isOrcid)).toEqual(
    [false, false, false, false],
  );
});
