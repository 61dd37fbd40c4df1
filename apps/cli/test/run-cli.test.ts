import { expect, test } from 'vitest';
import { runCli } from '../src/run-cli.js';
import { fakeTerminal, type FakeTerminalOptions } from './helpers/fake-terminal.js';

async function run(args: readonly string[], options: FakeTerminalOptions = {}) {
  const terminal = fakeTerminal(options);
  const status = await runCli(args, terminal);
  return { status, out: terminal.out(), err: terminal.err() };
}

const VERBS = [
  ...['inspect', 'constants', 'check', 'witness', 'certify', 'verify', 'completion'],
  ...['draft', 'model', 'sweep', 'seal', 'reproduce'],
];

test('help of the command', async () => {
  const { status, out, err } = await run(['--help']);
  expect({ status, err }).toEqual({ status: 0, err: '' });
  expect(out).toMatchSnapshot();
});

test.each(VERBS)('help of %s', async (verb) => {
  const { status, out, err } = await run([verb, '--help']);
  expect({ status, err }).toEqual({ status: 0, err: '' });
  expect(out).toMatchSnapshot();
  expect(Math.max(...out.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
});

test('`help <verb>` is `<verb> --help`', async () => {
  expect(await run(['help', 'check'])).toEqual(await run(['check', '--help']));
});

test.each(['--version', '-V'])('%s prints the version alone', async (flag) => {
  expect(await run([flag])).toEqual({ status: 0, out: '0.1.0\n', err: '' });
});

test.each<[readonly string[], string]>([
  [[], 'thalweg: expected a verb, got none; thalweg --help lists them\n'],
  [['constnts', 'm.json'], 'thalweg: expected a verb, got "constnts"; did you mean "constants"?\n'],
  [['frobnicate'], 'thalweg: expected a verb, got "frobnicate"; thalweg --help lists them\n'],
  [['--json'], 'expected a verb, got none'],
  [['inspect'], "thalweg: missing required argument 'model'\n"],
  [['inspect', 'a', 'b'], 'too many arguments'],
  [['inspect', 'a', '--onyl', 'gap'], "unknown option '--onyl'"],
  [['constants', 'a', '--onyl', 'gap'], '(Did you mean --only?)'],
  [['inspect', 'a', '--seed'], "option '--seed <number>' argument missing"],
  [['inspect', 'a', '--threads', '0'], '--threads: expected a whole number from 1 to 256, got "0"'],
  [['check', 'a'], 'expected at least one claim'],
  [['witness', 'a', 'entropy'], 'constant: expected one of gap, ge'],
  [['completion', 'csh'], 'shell: expected one of bash, zsh, fish, got "csh"'],
])('usage error of %o', async (args, message) => {
  const { status, out, err } = await run(args);
  expect(status).toBe(64);
  expect(out).toBe('');
  if (args[0] === '--json')
    expect(JSON.parse(err)).toMatchObject({ code: 'usage', message: expect.stringContaining(message) });
  else expect(err).toContain(message);
});

test('global options may stand before or after the verb', async () => {
  const before = await run(['--threads', '0', 'inspect', 'a']);
  const after = await run(['inspect', 'a', '--threads', '0']);
  expect(before).toEqual(after);
  expect(before.err).toContain('--threads');
});

test('after -- an option is an argument', async () => {
  const { status, err } = await run(['inspect', '--', '--json']);
  expect(status).not.toBe(64);
  expect(err).not.toMatch(/^\{/);
});

test('signal listeners are gone afterwards', async () => {
  const terminal = fakeTerminal();
  await runCli(['--version'], terminal);
  expect(terminal.interrupt()).toBe(false);
});
