import type { ReportDocument } from '@thalweg/format';
import { proseWidth, type Layout } from './layout.js';
import { listNumber, scaleOf } from './number-text.js';
import { wrapPieces } from './wrap.js';

type Eigenvalue = NonNullable<ReportDocument['spectrum']>[number];

const SHOWN = 16;

/** Eigenvalues of −L by real part, equal ones with their number, conjugate pairs as one. */
export function spectrumLines({ spectrum }: ReportDocument, layout: Layout, indent: number): string[] {
  if (spectrum === null) return [];
  const counts = new Map<string, number>();
  const scale = scaleOf(spectrum.flat());
  for (const value of spectrum) {
    const text = eigenvalueText(value, scale);
    if (text !== null) counts.set(text, (counts.get(text) ?? 0) + 1);
  }
  const all = [...counts].map(([text, count]) => (count === 1 ? text : `${text} (×${count})`));
  const shown = all.slice(0, SHOWN);
  if (all.length > SHOWN) shown.push(`… ${spectrum.length} in all, listed by --json`);
  return wrapPieces(shown, '  ', proseWidth(layout), indent);
}

/** Null for the second of a conjugate pair. */
function eigenvalueText(value: Eigenvalue, scale: number): string | null {
  if (typeof value === 'number') return listNumber(value, scale);
  const [re, im] = value;
  const size = listNumber(Math.abs(im), scale);
  if (size === '0') return listNumber(re, scale);
  return im < 0 ? null : `${listNumber(re, scale)} ± ${size}i`;
}
