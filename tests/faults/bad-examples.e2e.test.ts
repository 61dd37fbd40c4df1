import { beforeAll, expect, test, vi } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { expectRefusal, folderWith, type Files } from './support/refusal.js';

/** A build may come first, and a busy machine starts processes slowly. */
const PATIENCE_MILLISECONDS = 300_000;
vi.setConfig({ testTimeout: PATIENCE_MILLISECONDS });

beforeAll(ensureBundle, PATIENCE_MILLISECONDS);

const parameter = { name: 'n', type: 'integer', range: [2, 6], default: 2, meaning: 'levels' };
const MODEL =
  "({ n }) => ({ schema: 'thalweg.model/1', algebra: [n], generator: { form: 'expectation', onto: { scalars: true } } })";

/** An example package in the folder `ex`, with changed files. */
function example(changes: Record<string, string> = {}, document: Record<string, unknown> = {}): Files {
  const whole = {
    schema: 'thalweg.example/1',
    name: 'ex',
    version: '1.0.0',
    title: 'T',
    summary: 'S',
    licence: 'MIT',
    authors: [{ name: 'A' }],
    keywords: [],
    references: [],
    parameters: [parameter],
    showcase: [{}],
    ...document,
  };
  return {
    'ex/example.json': whole,
    'ex/generate.js': `export default ${MODEL};\n`,
    'ex/NOTES.md': '# T\n',
    'ex/LICENSE': 'MIT\n',
    ...changes,
  };
}

const claims = (text: string) => `export default ${MODEL};\nexport const claims = ${text};\n`;

test.each<[string, Files, string[], number, string[]]>([
  ['no folder', {}, ['model', 'nowhere'], 66, ['nowhere', 'there is no such file']],
  [
    'a folder without an example',
    { 'ex/a.txt': 'x' },
    ['model', 'ex'],
    65,
    ['expected the file example.json', 'got none'],
  ],
  [
    'a document instead of an example',
    { 'm.json': '{}' },
    ['model', 'm.json'],
    64,
    ['expected an example', 'thalweg draft'],
  ],
  [
    '--set beside a document',
    { 'm.json': '{}' },
    ['inspect', 'm.json', '--set', 'n=3'],
    64,
    ['--set: expected an example'],
  ],
  [
    'a fault in example.json',
    example({}, { licence: 'mine' }),
    ['model', 'ex'],
    65,
    ['SPDX', '/licence of ex/example.json'],
  ],
  ['an unknown parameter', example(), ['constants', 'ex', '--set', 'm=3'], 64, ['one of the parameters n, got "m"']],
  ['a value out of range', example(), ['model', 'ex', '--set', 'n=9'], 64, ['from 2 to 6 for n, got 9']],
  [
    'a syntax error',
    example({ 'ex/generate.js': 'export default (' }),
    ['model', 'ex'],
    65,
    ['generate.js', 'ex (n=2)'],
  ],
  [
    'an exception',
    example({ 'ex/generate.js': 'export default () => { throw new Error("no"); }' }),
    ['model', 'ex'],
    65,
    ['no', 'ex (n=2)'],
  ],
  [
    'no model',
    example({ 'ex/generate.js': 'export default () => 3;' }),
    ['model', 'ex'],
    65,
    ['expected an object, got 3', 'ex (n=2)'],
  ],
  [
    'a model that names a file',
    example({
      'ex/generate.js':
        "export default () => ({ schema: 'thalweg.model/1', algebra: [2], generator: { form: 'lindblad', jumps: [{ matrix: { file: 'v.npy' } }] } });",
    }),
    ['constants', 'ex', '--only', 'gap'],
    65,
    ['expected matrices inside the document', '/generator/jumps/0/matrix'],
  ],
  [
    'claims without a source',
    example({ 'ex/generate.js': claims("() => [{ constant: 'gap', relation: 'equals', value: 1 }]") }),
    ['seal', 'ex'],
    65,
    ['/0/source of claims of ex (n=2)'],
  ],
  [
    'a limit along nothing',
    example({
      'ex/generate.js': claims("() => [{ constant: 'gap', relation: 'tends-to', value: 1, along: 'N', source: 's' }]"),
    }),
    ['seal', 'ex'],
    65,
    ['expected "along" to name a parameter, got "N"'],
  ],
  ['a stray file', example({ 'ex/notes.txt': 'x' }), ['seal', 'ex'], 65, ['got notes.txt; move it into evidence']],
  [
    'an archive inside its folder',
    example(),
    ['seal', 'ex', '-o', 'ex/evidence'],
    64,
    ['expected a folder outside of the example'],
  ],
  ['an archive into nowhere', example(), ['seal', 'ex', '-o', 'nowhere'], 73, ['nowhere']],
  [
    'a zip file of something else',
    { 'a.zip': 'PK\u0003\u0004 and so on, for more than twenty bytes' },
    ['model', 'a.zip'],
    65,
    ['thalweg seal wrote'],
  ],
  [
    'a changed archive',
    { [`${'0'.repeat(64)}.zip`]: 'PK\u0003\u0004 and so on' },
    ['model', `${'0'.repeat(64)}.zip`],
    65,
    ['expected an archive with the SHA-256 0000'],
  ],
  ['no ranges', example(), ['sweep', 'ex'], 64, ['expected ranges of parameters, got none']],
  ['a range without end', example(), ['sweep', 'ex', '--over', 'n=2:'], 64, ['--over: expected a decimal']],
  [
    'a sweep into a file of something else',
    { ...example(), 's.txt': 'my notes\n' },
    ['sweep', 'ex', '--over', 'n=2:3', '-o', 's.txt'],
    65,
    ['expected the points of a sweep in s.txt'],
  ],
  ['work without a queue', {}, ['sweep', '--work'], 64, ['--work: expected --queue']],
  [
    'a draft over something',
    example(),
    ['draft', 'ex', '--title', 'T', '--author', 'A'],
    73,
    ['expected a new or empty folder, got ex'],
  ],
  [
    'a draft without an author',
    {},
    ['draft', 'new', '--title', 'T'],
    64,
    ['expected --author, got none and no terminal'],
  ],
  [
    'a record of an archive',
    { 'a.zip': 'x' },
    ['reproduce', 'a.zip', '--record'],
    64,
    ['--record: expected the folder of an example'],
  ],
])('%s', async (_title, files, args, exitCode, says) => {
  await expectRefusal(files, args, { exitCode, says });
});

test('an endless generator is ended, and the point told', async () => {
  const { run, remove } = folderWith(
    example({ 'ex/generate.js': `export default (p) => { for (; p.n > 2; ); return (${MODEL})(p); };` }),
  );
  const { exitCode, stdout, stderr } = await run(['sweep', 'ex', '--over', 'n=2:3', '--csv']);
  remove();
  expect(exitCode, stderr).toBe(1);
  expect(stdout.split('\n')[1]).toMatch(/^2,0\.99|^2,1/);
  expect(stdout.split('\n')[2]).toContain('expected generate.js to end within 10000 ms');
});
