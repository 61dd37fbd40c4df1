import { PassThrough } from 'node:stream';
import { parseExample, readExample, type ModelDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { completeAnswers } from '../../src/draft/complete-answers.js';
import { draftFiles } from '../../src/draft/draft-files.js';
import { licenceText } from '../../src/draft/licence-text.js';
import { fakeTerminal } from '../helpers/fake-terminal.js';

const NONE = { name: null, title: null, summary: null, author: null, orcid: null, affiliation: null, licence: null };
const answers = {
  name: 'my-family',
  title: 'My family',
  summary: 'A family.',
  author: 'Ada Example',
  orcid: '0000-0002-1825-0097',
  affiliation: null,
  licence: 'MIT',
};
const model: ModelDocument = {
  schema: 'thalweg.model/1',
  title: 'T',
  generator: {
    form: 'rates',
    rates: [
      [0, 1],
      [1, 0],
    ],
  },
};

test.each([null, model])('a draft is a valid package', (from) => {
  const files = [...draftFiles(answers, from)].map(([name, text]) => [name, new TextEncoder().encode(text)] as const);
  const { document, recorded } = readExample(new Map(files));
  expect(document).toMatchObject({ name: 'my-family', authors: [{ name: 'Ada Example', orcid: answers.orcid }] });
  expect(document.parameters.length).toBe(from === null ? 2 : 0);
  expect(recorded).toBeNull();
});

test('a model becomes the generator as it is', () => {
  const source = draftFiles(answers, model).get('generate.js') ?? '';
  const literal = /export default \(\) => \((.*)\);\n$/s.exec(source)?.[1] ?? '';
  expect(JSON.parse(literal)).toEqual(model);
});

test('the text of MIT, and where those of other licences stand', () => {
  expect(licenceText(answers)).toMatch(/^MIT License\n\nCopyright \(c\) Ada Example\n\nPermission is hereby granted/);
  const other = licenceText({ ...answers, licence: 'CC-BY-4.0 OR Apache-2.0' });
  expect(other.match(/https:\S+/g)).toEqual([
    'https://spdx.org/licenses/CC-BY-4.0.html',
    'https://spdx.org/licenses/Apache-2.0.html',
  ]);
});

/** A terminal on which someone types these lines. */
function typing(...lines: string[]) {
  const terminal = fakeTerminal({ isTTY: true });
  const stdin = Object.assign(new PassThrough(), { isTTY: true });
  stdin.end(lines.map((line) => `${line}\n`).join(''));
  return { ...terminal, stdin };
}

test('a terminal is asked for what no option gives, and again for what does not fit', async () => {
  const terminal = typing('', 'My family', 'A family.', 'Ada Example', '0000', '', 'Institute', 'none', 'MIT');
  const fallbacks = { ...NONE, name: 'my-family', licence: 'MIT' };
  expect(await completeAnswers(NONE, fallbacks, terminal)).toEqual({
    ...answers,
    orcid: null,
    affiliation: 'Institute',
  });
  const asked = terminal.err();
  expect(asked).toContain('Name (a-z, 0-9, hyphens) [my-family]: ');
  expect(asked).toContain('expected an ORCID iD');
  expect(asked).toContain('expected an SPDX licence expression');
});

test('options are not asked for', async () => {
  const terminal = typing();
  expect(await completeAnswers({ ...answers, affiliation: 'I' }, NONE, terminal)).toEqual({
    ...answers,
    affiliation: 'I',
  });
  expect(terminal.err()).toBe('');
});

test('an input that ends is refused', async () => {
  await expect(completeAnswers(NONE, NONE, typing('my-family'))).rejects.toThrow('got the end of the input');
});

test('without a terminal, what has no default is asked for by its option', async () => {
  const terminal = fakeTerminal({ stdin: '' });
  await expect(completeAnswers(NONE, { ...NONE, name: 'n1', licence: 'MIT' }, terminal)).rejects.toThrow(
    'expected --title, got none and no terminal to ask on',
  );
  const given = { ...NONE, title: 'T', author: 'A' };
  const found = await completeAnswers(given, { ...NONE, name: 'n1', summary: 'T', licence: 'MIT' }, terminal);
  expect(found).toEqual({ ...NONE, name: 'n1', title: 'T', summary: 'T', author: 'A', licence: 'MIT' });
});

test.each([
  ['name', 'My Family', '--name: expected a name of 2 to 64 characters'],
  ['orcid', '0000-0002-1825-0098', '--orcid: expected an ORCID iD'],
  ['licence', 'mine', '--licence: expected an SPDX licence expression'],
  ['title', '', '--title: expected one line of text'],
])('the option --%s is checked', async (field, value, says) => {
  await expect(completeAnswers({ ...answers, [field]: value }, NONE, fakeTerminal())).rejects.toThrow(says);
  expect(() => parseExample('{}')).toThrow();
});
