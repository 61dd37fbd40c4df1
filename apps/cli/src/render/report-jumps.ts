import type { ReportDocument } from '@thalweg/format';
import { decimalColumn } from './decimal-column.js';
import type { Layout } from './layout.js';
import { listNumber, scaleOf } from './number-text.js';

const SHOWN = 24;
const GAP = '   ';

/** The jumps of the canonical form as a table: label, frequency, Frobenius norm. */
export function jumpTable({ jumps }: ReportDocument, { colours }: Layout, indent: number): string[] {
  if (jumps === null || jumps.length === 0) return [];
  const shown = jumps.slice(0, SHOWN);
  const frequency = numberColumn(
    'frequency ω',
    shown.map((jump) => jump.frequency),
  );
  const norm = numberColumn(
    'norm ‖V‖',
    shown.map((jump) => jump.norm),
  );
  const label = leftColumn(['jump', ...shown.map((jump) => jump.label ?? '')]);
  const [head = '', ...lines] = label.map((text, k) => [text, frequency[k], norm[k]].join(GAP).trimEnd());
  const margin = ' '.repeat(indent);
  const more = jumps.length > SHOWN ? [`${margin}… ${jumps.length} in all, listed by --json`] : [];
  return [margin + colours.dim(head), ...lines.map((line) => margin + line), ...more];
}

function numberColumn(head: string, values: readonly number[]): string[] {
  const scale = scaleOf(values);
  return leftColumn([head, ...decimalColumn(values.map((value) => listNumber(value, scale)))]);
}

function leftColumn(texts: readonly string[]): string[] {
  const width = Math.max(0, ...texts.map((text) => text.length));
  return texts.map((text) => text.padEnd(width));
}
