import { beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { MEANINGS, SHAPES, type BadModel } from './support/bad-models.js';
import { expectRefusal, type Refusal } from './support/refusal.js';

beforeAll(ensureBundle);

const WHAT_CAME_AND_WHAT_TO_DO = /^thalweg: expected .+, got .+; .+ \((at \S.* of|in) m\.json\)\n$/;

const TEXTS: readonly BadModel[] = [
  [
    'not JSON',
    '{"schema": "thalweg.model/1", algebra: [2]}',
    'expected a field name in double quotes, got algebra (line 1, column 31); remove',
    'm.json',
  ],
  ['an empty document', '', 'expected a JSON value, got the end of the text (line 1, column 1); write', 'm.json'],
  [
    'a document cut short',
    '{"schema":"thalweg.model/1","algebra":[2],',
    'got the end of the text (line 1, column 43);',
    'm.json',
  ],
  ['not UTF-8', new Uint8Array([0xff, 0xfe, 0x7b]), 'expected UTF-8 text, got bytes', '; save', 'm.json'],
  [
    'a duplicate key',
    '{"schema":"thalweg.model/1","algebra":[2],"algebra":[3],"generator":{"form":"lindblad","jumps":[]}}',
    'expected each field once, got "algebra" again (line 1, column 43); remove one',
    '(at /algebra of m.json)',
  ],
  [
    'NaN',
    '{"schema":"thalweg.model/1","algebra":[2],"generator":{"form":"lindblad","jumps":[{"matrix":[[NaN,1],[1,0]]}]}}',
    'expected a finite number, got NaN (line 1, column 95);',
    '(at /generator/jumps/0/matrix/0/0 of m.json)',
  ],
  [
    'an overflowing number',
    '{"schema":"thalweg.model/1","algebra":[2],"generator":{"form":"lindblad","jumps":[{"matrix":[[1e999,1],[1,0]]}]}}',
    'expected a number below 1.8e308 in size, got 1e999',
    '; write a finite number (at /generator/jumps/0/matrix/0/0 of m.json)',
  ],
  ['endless nesting', '['.repeat(100_000), 'expected at most 64 levels of nesting, got more', '; flatten', '…'],
];

describe.each([
  ['text', TEXTS],
  ['shape', SHAPES],
  ['meaning', MEANINGS],
])('a model document wrong in %s is refused', (_, cases) => {
  test.each(cases.map(([name, content, ...says]) => ({ name, content, says })))('$name', async ({ content, says }) => {
    const refusal: Refusal = { exitCode: 65, says };
    const message = await expectRefusal({ 'm.json': content }, ['constants', 'm.json', '--only', 'gap'], refusal);
    expect(message).toMatch(WHAT_CAME_AND_WHAT_TO_DO);
  });
});
