import picocolors from 'picocolors';
import type { Layout } from '../../../src/render/layout.js';

/** A layout without colours. */
export function plain(width = 80): Layout {
  return { width, colours: picocolors.createColors(false) };
}

/** A layout with them. */
export function coloured(width = 80): Layout {
  return { width, colours: picocolors.createColors(true) };
}

/** Text without the codes of colours. */
export function bare(text: string): string {
  // eslint-disable-next-line no-control-regex -- what colours are made of
  return text.replaceAll(/\u001b\[\d+m/g, '');
}
