import type { ComparisonStart } from './comparison-starts.js';
import type { PairComparison } from './compare-pair.js';
import { type ObservedConstant, isLower } from './observed-constant.js';

/** Three notions of curvature on one model, each as the lowest value that was seen. */
export const NOTIONS = ['gradient', 'evi', 'convexity'] as const;

export type Notion = (typeof NOTIONS)[number];

/** The worst case of one notion: the lowest of value + error. */
export interface NotionValue {
  readonly notion: Notion;
  readonly value: number;
  /** Estimated: discretisation in time, the length of the geodesic through the witness, rounding. */
  readonly error: number;
  readonly seen: ObservedConstant;
  /** The pair of states where it was seen. */
  readonly start: ComparisonStart;
}

/**
 * The lowest value of EVI and of geodesic convexity over all pairs. The two short geodesics through a witness, one half as long as the
 * other, show how far each is from its limit at the witness: by symmetry the difference is of second order in the length.
 */
export function worstNotion(notion: 'evi' | 'convexity', pairs: readonly PairComparison[]): NotionValue | null {
  const short = pairs.flatMap((pair) => (pair.start.kind === 'random' ? [] : (pair[notion] ?? [])));
  const reach = short.length === 2 ? Math.abs(short[0].value - short[1].value) : 0;
  let worst: NotionValue | null = null;
  for (const pair of pairs) {
    const seen = pair[notion];
    if (!seen) continue;
    const error = seen.error + (pair.start.kind === 'random' ? 0 : reach);
    if (worst && !isLower({ value: seen.value, error }, worst)) continue;
    worst = { notion, value: seen.value, error, seen, start: pair.start };
  }
  return worst;
}

/** Whether all notions agree within their errors. */
export function notionsAgree(values: readonly { readonly value: number; readonly error: number }[]): boolean {
  return values.every((a) => values.every((b) => Math.abs(a.value - b.value) <= a.error + b.error));
}
