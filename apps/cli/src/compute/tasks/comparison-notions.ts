import {
  fromCoordinates,
  notionsAgree,
  worstNotion,
  type NotionValue,
  type PairComparison,
  type TransportModel,
  type Witness,
} from '@thalweg/core';
import { encodeMatrix, type ComparisonDocument, type EndDocument } from '@thalweg/format';

type Notions = ComparisonDocument['notions'];

/** The worst case of each notion, and whether they agree; the gradient estimate's is its witness. */
export function comparedNotions(
  model: TransportModel,
  witness: Witness | null,
  pairs: readonly PairComparison[],
  { lower, upper }: { readonly lower: EndDocument | null; readonly upper: EndDocument | null },
): { readonly notions: Notions; readonly agree: boolean } {
  const proved = lower?.value ?? null;
  const notions: Notions = [];
  if (witness?.observable) {
    const { value, state, observable } = witness;
    const error = upper?.margin ?? 0;
    const aboveProved = isAbove(value, error, proved);
    notions.push({ notion: 'gradient', value, error, aboveProved, state: encodeMatrix(state), against: encodeMatrix(observable) }); // prettier-ignore
  }
  for (const name of ['evi', 'convexity'] as const) {
    const worst = worstNotion(name, pairs);
    if (worst) notions.push(encodeNotion(model, worst, proved));
  }
  return { notions, agree: notions.length === 3 && notionsAgree(notions) };
}

function encodeNotion(
  { structure: { algebra } }: TransportModel,
  { notion, value, error, seen, start }: NotionValue,
  proved: number | null,
): Notions[number] {
  return {
    notion,
    value,
    error,
    aboveProved: isAbove(value, error, proved),
    state: encodeMatrix(fromCoordinates(algebra, seen.state)),
    against: encodeMatrix(start.to),
    ...(notion === 'convexity' && { from: encodeMatrix(start.from) }),
    time: seen.time,
  };
}

function isAbove(value: number, error: number, proved: number | null): boolean | null {
  return proved === null ? null : value + error + ROUNDING * Math.abs(proved) >= proved;
}

const ROUNDING = 1e-9;
