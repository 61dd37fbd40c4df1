import type { ReliefDocument } from '@thalweg/format';
import { decimalColumn } from './decimal-column.js';
import { proseWidth, type Layout } from './layout.js';
import { modelHead } from './model-line.js';
import { minus, shortNumber } from './number-text.js';
import { wrap } from './wrap.js';

const GAP = '   ';
const INDENT = '  ';
const RINGS_SHOWN = 6;
const RAYS_SHOWN = 12;

/** What a relief shows, for people, and with `table` some of its values. */
export function renderRelief(relief: ReliefDocument, layout: Layout, { table }: { readonly table: boolean }): string {
  const lines = [
    ...modelHead(relief.model, layout),
    ...sentences(relief).flatMap((text) => wrap(text, proseWidth(layout), 2)),
    ...(table ? ['', ...valueTable(relief, layout)] : []),
    '',
    ...wrap(LIMITS, proseWidth(layout), 2).map((line) => layout.colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

const LIMITS =
  'κ(ρ) is the smallest eigenvalue of the curvature form at the state ρ; its infimum over all faithful states is ge. What is met on a slice ' +
  'bounds ge from above only. Bounds hold for the model as given, not for a device.';

function sentences(relief: ReliefDocument): string[] {
  const { grid, lowest, reference } = relief;
  const missing = grid.kappa.filter((value) => value === null).length;
  const count = (grid.rings - 1) * grid.rays + 1;
  const mean = relief.mean === 'logarithmic' ? '' : `, ${relief.mean} mean`;
  return [
    `κ over ${sliceText(relief)}${mean}, at ${count} states`,
    ...(lowest
      ? [
          `lowest κ met: ${number(lowest.kappa)} at (${place(lowest)}), observed, margin ${shortNumber(lowest.margin)}` +
            (lowest.atRim ? '; κ still falls towards the boundary of state space there' : ''),
        ]
      : ['κ is resolved at none of them']),
    ...(reference ? [`reference state σ at (${place(reference)})`] : []),
    ...(missing > 0 ? [`at ${missing} of them κ is not resolved in double precision`] : []),
  ];
}

function sliceText({ slice: { kind, axes, marks } }: ReliefDocument): string {
  if (kind === 'bloch disc') return `the disc of Bloch vectors with coordinates ${axes.join(' and ')}`;
  const names = marks.map(({ name }) => name);
  return kind === 'triangle'
    ? `the triangle with corners ${names.join(', ')}`
    : `the plane through σ, ${names.join(' and ')}, in distances ‖·‖₂ from σ`;
}

/** A few rings, a few points on each. */
function valueTable({ grid }: ReliefDocument, { colours, width }: Layout): string[] {
  const { rings, rays, x, y, kappa } = grid;
  const indices = [0];
  const each = Math.max(1, Math.floor(rays / RAYS_SHOWN));
  for (let r = 1; r <= RINGS_SHOWN; r++) {
    const ring = Math.round(((rings - 1) * r) / RINGS_SHOWN);
    for (let j = 0; j < rays; j += each) indices.push(ring * rays + j);
  }
  const columns = [
    ['x', ...decimalColumn(indices.map((k) => fixed(x[k])))],
    ['y', ...decimalColumn(indices.map((k) => fixed(y[k])))],
    ['κ', ...decimalColumn(indices.map((k) => (kappa[k] === null ? '—' : number(kappa[k] ?? 0))))],
  ].map((column) => {
    const widest = Math.max(...column.map((text) => text.length));
    return column.map((text) => text.padEnd(widest));
  });
  const [head = '', ...rows] = indices
    .concat(0)
    .map((_, line) => (INDENT + columns.map((column) => column[line] ?? '').join(GAP)).trimEnd());
  const note = `${indices.length} of ${(rings - 1) * rays + 1} states; --csv and --json give all`;
  return [colours.bold(head), INDENT + '─'.repeat(Math.min(width - 2, 36)), ...rows, '', INDENT + note];
}

function place({ x, y }: { readonly x: number; readonly y: number }): string {
  return `${fixed(x)}, ${fixed(y)}`;
}

function fixed(value: number | undefined): string {
  const text = (value ?? 0).toFixed(5);
  return minus(/[1-9]/.test(text) ? text : '0.00000');
}

function number(value: number): string {
  return minus(String(Number(value.toPrecision(7))));
}
