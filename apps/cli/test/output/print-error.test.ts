import { ThalwegError } from '@thalweg/core';
import { expect, test } from 'vitest';
import { printError } from '../../src/output/print-error.js';
import { fakeTerminal } from '../helpers/fake-terminal.js';

const plain = { json: false, color: true };

test('one line with the place in the document, on stderr only', () => {
  const terminal = fakeTerminal();
  const error = new ThalwegError('negative-rate', 'expected a rate of at least 0, got -1; change its sign', {
    pointer: '/generator/rates/0/1',
  });
  printError(error, terminal, plain);
  expect(terminal.err()).toBe(
    'thalweg: expected a rate of at least 0, got -1; change its sign (at /generator/rates/0/1)\n',
  );
  expect(terminal.out()).toBe('');
});

test('--json gives one JSON document with a schema', () => {
  const terminal = fakeTerminal();
  const error = new ThalwegError('not-json', 'expected JSON', { pointer: '', details: { line: 3 } });
  expect(printError(error, terminal, { json: true, color: true })).toBe(65);
  expect(JSON.parse(terminal.err())).toEqual({
    schema: 'thalweg.error/1',
    code: 'not-json',
    message: 'expected JSON',
    pointer: '',
    details: { line: 3 },
    exitStatus: 65,
  });
});

test('an unknown error is a fault of the program, told without a stack', () => {
  const terminal = fakeTerminal();
  expect(printError(new TypeError('x is undefined'), terminal, plain)).toBe(70);
  expect(terminal.err()).toMatch(/^thalweg: internal error: x is undefined\. .*report.*\n$/);
  expect(terminal.err()).not.toContain('print-error.test');
});

test('THALWEG_DEBUG adds the stack', () => {
  const terminal = fakeTerminal({ env: { THALWEG_DEBUG: '1' } });
  printError(new TypeError('x is undefined'), terminal, plain);
  expect(terminal.err()).toContain('print-error.test');
});

test('red only on a terminal that wants colours', () => {
  const printed = (options: Parameters<typeof fakeTerminal>[0], color: boolean) => {
    const terminal = fakeTerminal(options);
    printError(new ThalwegError('usage', 'm'), terminal, { json: false, color });
    return terminal.err();
  };
  const red = '\u001b[31m';
  expect(printed({ isTTY: true }, true)).toContain(red);
  expect(printed({ isTTY: true, env: { NO_COLOR: '' } }, true)).toContain(red);
  expect(printed({ isTTY: true, env: { NO_COLOR: '1' } }, true)).not.toContain(red);
  expect(printed({ isTTY: true, env: { TERM: 'dumb' } }, true)).not.toContain(red);
  expect(printed({ isTTY: true }, false)).not.toContain(red);
  expect(printed({ isTTY: false }, true)).not.toContain(red);
});
