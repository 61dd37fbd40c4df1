import { ThalwegError } from '../errors.js';
import { CLOSED_FLOOR, CLOSED_TOLERANCE, ORDER_TOLERANCE } from '../tolerances.js';
import type { Bracket, End } from './bracket.js';
import { type OrderRelation, type RowKey, betterLower, betterUpper } from './order-relations.js';

/** One row of a sheet before it is written down. */
export interface SheetRow extends Bracket {
  readonly key: RowKey;
  /** Both ends are known and agree to the digits shown. */
  readonly closed: boolean;
  /** What the reader should know: why an end is missing, what a value rests on. */
  readonly notes: readonly string[];
  /** ε of `mixing`. */
  readonly epsilon?: number;
}

/**
 * Pass lower ends up and upper ends down along the order relations until nothing improves, then assert the order: a
 * lower end above an upper one is a bug somewhere and stops everything (`internal`). `scale` is a rate to which widths near
 * zero are compared: the gap.
 */
export function closeBrackets(
  rows: readonly SheetRow[],
  relations: readonly OrderRelation[],
  scale: number,
): SheetRow[] {
  const table = new Map(rows.map((row) => [nameOf(row.key), row]));
  let changed = true;
  for (let round = 0; changed && round <= relations.length; round++) {
    changed = false;
    for (const relation of relations) changed = apply(table, relation) || changed;
  }
  const out = rows.map((row) => withClosed(table.get(nameOf(row.key)) as SheetRow, scale));
  for (const row of out) assertOrder(row, scale);
  return out;
}

/** `ge:left`, `gap`: the name a row goes by. */
export function nameOf({ id, mean }: RowKey): string {
  return mean && mean !== 'logarithmic' ? `${id}:${mean}` : id;
}

function apply(table: Map<string, SheetRow>, { below, above, why, ifPositive }: OrderRelation): boolean {
  const low = table.get(nameOf(below));
  const high = table.get(nameOf(above));
  if (!low || !high) return false;
  let changed = false;
  const lifted = low.lower && (!ifPositive || low.lower.value > 0) ? through(low.lower, why) : null;
  const lower = betterLower(high.lower, lifted);
  if (lower !== high.lower) {
    table.set(nameOf(above), { ...high, lower });
    changed = true;
  }
  const upper = betterUpper(low.upper, high.upper && through(high.upper, why));
  if (upper !== low.upper) {
    table.set(nameOf(below), { ...low, upper });
    changed = true;
  }
  return changed;
}

function through(end: End, why: string): End {
  return { ...end, by: `${why}; ${end.by}` };
}

function withClosed(row: SheetRow, scale: number): SheetRow {
  const { lower, upper } = row;
  if (!lower || !upper) return { ...row, closed: false };
  if (!Number.isFinite(lower.value) || !Number.isFinite(upper.value)) {
    return { ...row, closed: lower.value === upper.value };
  }
  const size = Math.max(
    Math.abs(upper.value),
    Math.abs(lower.value),
    Number.isFinite(scale) ? CLOSED_FLOOR * scale : 0,
  );
  return { ...row, closed: upper.value - lower.value <= CLOSED_TOLERANCE * size };
}

function assertOrder({ key, lower, upper }: SheetRow, scale: number): void {
  if (!lower || !upper) return;
  const size = Math.abs(lower.value) + Math.abs(upper.value);
  const floor = Number.isFinite(scale) ? scale : 0;
  const slack = ORDER_TOLERANCE * (size + floor) + (lower.margin ?? 0) + (upper.margin ?? 0);
  if (lower.value <= upper.value || (size < Infinity && lower.value <= upper.value + slack)) return;
  throw new ThalwegError(
    'internal',
    `expected the ends of ${nameOf(key)} in order, got ${lower.value} (${lower.by}) above ${upper.value} (${upper.by}); one of the two is wrong: please report the model`,
  );
}
