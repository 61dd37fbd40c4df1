import type { WitnessDocument } from '@thalweg/format';
import type { Layout } from './render-sheet.js';
import { wrap } from './wrap.js';

const LARGEST_SHOWN = 6;

type MatrixText = WitnessDocument['state'];

/** A witness for people: the value, the state and the observable. */
export function renderWitness(witness: WitnessDocument, { width, colours }: Layout): string {
  const name =
    witness.mean !== undefined && witness.mean !== 'logarithmic'
      ? `${witness.constant}:${witness.mean}`
      : witness.constant;
  const ancilla = witness.amplification > 1 ? ` with an ancilla of side ${witness.amplification}` : '';
  return `${[
    ...wrap(`${name} ≤ ${witness.value.toPrecision(10).replace('-', '−')}${ancilla}, shown by`, width, 2).map((line) =>
      colours.bold(line),
    ),
    '',
    '  state',
    ...matrixLines(witness.state),
    ...(witness.observable === null ? [] : ['', '  observable', ...matrixLines(witness.observable)]),
    '',
    ...wrap(`model ${witness.model}`, width, 2).map((line) => colours.dim(line)),
  ].join('\n')}\n`;
}

function matrixLines(matrix: MatrixText): string[] {
  const parts = Array.isArray(matrix) ? { re: matrix, im: null } : 're' in matrix ? matrix : null;
  if (parts === null || parts.re.length > LARGEST_SHOWN) return ['    too large to show; --json or -o gives it'];
  return (parts.re as readonly (readonly number[])[]).map((row, i) => {
    const cells = row.map((x, j) =>
      entryText(x, Number((parts.im as readonly (readonly number[])[] | null)?.[i]?.[j] ?? 0)),
    );
    return `    ${cells.join('  ')}`;
  });
}

function entryText(re: number, im: number): string {
  const real = re.toFixed(6).replace('-', '−').padStart(9);
  return im === 0 ? real : `${real}${im < 0 ? '−' : '+'}${Math.abs(im).toFixed(6)}i`;
}
