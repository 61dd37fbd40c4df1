import { expect, test } from 'vitest';
import { createOutput } from '../../src/output/output.js';
import { fakeTerminal } from '../helpers/fake-terminal.js';

const options = { json: false, quiet: false, color: true };

test('results go to stdout and notes to stderr', () => {
  const terminal = fakeTerminal();
  const output = createOutput(terminal, options);
  output.result('gap 1\n');
  output.note('searched 3 starts');
  expect(terminal.out()).toBe('gap 1\n');
  expect(terminal.err()).toBe('searched 3 starts\n');
});

test('--quiet silences notes and progress, not results', () => {
  const terminal = fakeTerminal({ isTTY: true });
  const output = createOutput(terminal, { ...options, quiet: true });
  output.note('note');
  output.progress('1 of 3');
  output.result('r\n');
  expect(terminal.err()).toBe('');
  expect(terminal.out()).toBe('r\n');
});

test('progress is written only on a terminal, cut to its width, and cleared before anything else', () => {
  const piped = fakeTerminal();
  createOutput(piped, options).progress('1 of 3');
  expect(piped.err()).toBe('');

  const terminal = fakeTerminal({ isTTY: true, columns: 40 });
  const output = createOutput(terminal, options);
  output.progress('x'.repeat(60));
  expect(terminal.err()).toBe(`\r\u001b[2K${'x'.repeat(39)}`);
  output.note('done');
  expect(terminal.err().endsWith('\r\u001b[2Kdone\n')).toBe(true);
});

test('a document is indented JSON with a final newline', () => {
  const terminal = fakeTerminal();
  createOutput(terminal, options).document({ schema: 'thalweg.sheet/1', constants: [] });
  expect(terminal.out()).toBe('{\n  "schema": "thalweg.sheet/1",\n  "constants": []\n}\n');
});

test('width is that of the terminal, 80 for a pipe, never below 40', () => {
  const width = (isTTY: boolean, columns?: number) =>
    createOutput(fakeTerminal({ isTTY, ...(columns === undefined ? {} : { columns }) }), options).width;
  expect(width(true, 132)).toBe(132);
  expect(width(true, 20)).toBe(40);
  expect(width(true)).toBe(80);
  expect(width(false, 132)).toBe(80);
});
