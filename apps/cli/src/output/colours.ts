import picocolors from 'picocolors';
import type { OutputStream, Terminal } from '../terminal.js';

export type Colours = ReturnType<typeof picocolors.createColors>;

/** Colours for a stream: only on a terminal, and neither --no-color nor a non-empty NO_COLOR (no-color.org) forbids them. */
export function colours(stream: OutputStream, env: Terminal['env'], wanted: boolean): Colours {
  const forbidden = (env.NO_COLOR ?? '') !== '' || env.TERM === 'dumb';
  return picocolors.createColors(wanted && !forbidden && stream.isTTY === true);
}
