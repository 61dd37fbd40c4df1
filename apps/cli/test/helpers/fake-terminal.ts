import { EventEmitter } from 'node:events';
import { PassThrough } from 'node:stream';
import type { Terminal } from '../../src/terminal.js';

export interface FakeTerminal extends Terminal {
  /** What was written to each stream so far. */
  readonly out: () => string;
  readonly err: () => string;
  /** As if the person pressed Ctrl-C. */
  readonly interrupt: () => void;
}

export interface FakeTerminalOptions {
  readonly stdin?: string;
  readonly env?: Record<string, string>;
  readonly isTTY?: boolean;
  readonly columns?: number;
}

/** A terminal in memory: streams that collect, an environment of its own, signals on demand. */
export function fakeTerminal(options: FakeTerminalOptions = {}): FakeTerminal {
  const signals = new EventEmitter();
  const stdin = new PassThrough();
  if (options.stdin !== undefined) stdin.end(options.stdin);
  const stdout = collector(options);
  const stderr = collector(options);
  return {
    stdin,
    stdout: stdout.stream,
    stderr: stderr.stream,
    env: options.env ?? {},
    on: (event, listener) => signals.on(event, listener),
    off: (event, listener) => signals.off(event, listener),
    out: stdout.text,
    err: stderr.text,
    interrupt: () => signals.emit('SIGINT'),
  };
}

function collector({ isTTY = false, columns }: FakeTerminalOptions) {
  const chunks: string[] = [];
  const stream = new PassThrough();
  stream.on('data', (chunk: Buffer) => chunks.push(chunk.toString()));
  return { stream: Object.assign(stream, { isTTY, columns }), text: () => chunks.join('') };
}
