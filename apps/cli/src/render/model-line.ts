import type { SheetDocument } from '@thalweg/format';
import { proseWidth, type Layout } from './layout.js';
import { wrap, wrapPieces } from './wrap.js';

type ModelSummary = SheetDocument['model'];

const SYMMETRY_WORDS: Record<ModelSummary['symmetry'], string> = {
  tracial: 'symmetric for the trace',
  gns: 'GNS-symmetric',
  kms: 'KMS-symmetric, not GNS',
  none: 'not symmetric',
};

/** The name of a model that has none. */
export const UNTITLED = 'Untitled model';

const BLOCKS_SHOWN = 4;

/** The head of a result: title, then blocks, dimension, symmetry and whether it is primitive. */
export function modelHead(model: ModelSummary, layout: Layout, { structure = true } = {}): string[] {
  const { blocks, dimension, symmetry, primitive, title } = model;
  const pieces = [`blocks ${blockList(blocks)}`, `dimension ${dimension}`];
  if (structure) pieces.push(SYMMETRY_WORDS[symmetry], primitive === true ? 'primitive' : 'not primitive');
  return [
    ...wrap(title ?? UNTITLED, proseWidth(layout), 2).map((line) => layout.colours.bold(line)),
    ...wrapPieces(pieces, ' · ', proseWidth(layout), 2),
  ];
}

/** `[2,1]`; many blocks as the first few and their number. */
export function blockList(blocks: readonly number[]): string {
  const shown = blocks.length > 2 * BLOCKS_SHOWN ? `${blocks.slice(0, BLOCKS_SHOWN).join(',')},…` : blocks.join(',');
  return blocks.length > 2 * BLOCKS_SHOWN ? `[${shown}] (${blocks.length} of them)` : `[${shown}]`;
}
