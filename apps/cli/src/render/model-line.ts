import type { SheetDocument } from '@thalweg/format';

type ModelSummary = SheetDocument['model'];

const SYMMETRY_WORDS: Record<ModelSummary['symmetry'], string> = {
  tracial: 'symmetric for the trace',
  gns: 'GNS-symmetric',
  kms: 'KMS-symmetric, not GNS',
  none: 'not symmetric',
};

/** One line on a model: its blocks, dimension, symmetry and whether it is primitive. */
export function modelLine({ blocks, dimension, symmetry, primitive }: ModelSummary): string {
  return [
    `blocks [${shortList(blocks)}]`,
    `dimension ${dimension}`,
    SYMMETRY_WORDS[symmetry],
    primitive ? 'primitive' : 'not primitive',
  ].join(' · ');
}

function shortList(blocks: readonly number[]): string {
  if (blocks.length <= 8) return blocks.join(',');
  return `${blocks.slice(0, 4).join(',')},…(${blocks.length} blocks)`;
}
