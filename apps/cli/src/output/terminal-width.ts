import type { OutputStream } from '../terminal.js';

const DEFAULT_WIDTH = 80;
const NARROWEST = 40;

/** Columns to lay text out in: the terminal's, at least 40; 80 where the stream is a pipe or file. */
export function terminalWidth(stream: OutputStream): number {
  const { columns } = stream;
  if (stream.isTTY !== true || columns === undefined || columns <= 0) return DEFAULT_WIDTH;
  return Math.max(columns, NARROWEST);
}
