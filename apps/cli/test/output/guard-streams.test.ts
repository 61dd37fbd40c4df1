import { expect, test } from 'vitest';
import { guardStreams } from '../../src/output/guard-streams.js';
import { fakeTerminal } from '../helpers/fake-terminal.js';

const failure = (code: string) => Object.assign(new Error(`write ${code}`), { code });

test('a closed pipe is no error', async () => {
  const terminal = fakeTerminal();
  const guard = guardStreams(terminal);
  terminal.stdout.emit('error', failure('EPIPE'));
  await expect(guard.flush()).resolves.toBeUndefined();
});

test('results that could not be written are an error', async () => {
  const terminal = fakeTerminal();
  const guard = guardStreams(terminal);
  terminal.stdout.emit('error', failure('ENOSPC'));
  await expect(guard.flush()).rejects.toMatchObject({
    code: 'cannot-write',
    message: 'cannot write to standard output: write ENOSPC',
  });
});

test('a failing stderr is left alone', async () => {
  const terminal = fakeTerminal();
  const guard = guardStreams(terminal);
  terminal.stderr.emit('error', failure('EIO'));
  await expect(guard.flush()).resolves.toBeUndefined();
});

test('nothing listens after release', () => {
  const terminal = fakeTerminal();
  guardStreams(terminal).release();
  expect(terminal.stdout.listenerCount('error')).toBe(0);
  expect(terminal.stderr.listenerCount('error')).toBe(0);
});
