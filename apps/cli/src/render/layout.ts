import type { Colours } from '../output/colours.js';

/** How text is laid out: columns to fill, and colours that may do nothing. */
export interface Layout {
  readonly width: number;
  readonly colours: Colours;
}

/** Prose is not set wider than this, however wide the terminal. */
const WIDEST_PROSE = 100;

/** Columns that prose fills. */
export function proseWidth({ width }: Layout): number {
  return Math.min(width, WIDEST_PROSE);
}
