import type { ConstantId, End, Grade } from './bracket.js';
import type { MeanName } from '../metric/operator-mean.js';
import { CLOSED_TOLERANCE } from '../tolerances.js';

/** A row's name: the constant, and for `ge` its mean. */
export interface RowKey {
  readonly id: ConstantId;
  readonly mean?: MeanName;
}

/** `below ≤ above` between two constants, with the reason; `ifPositive` when it holds only for a positive lower end. */
export interface OrderRelation {
  readonly below: RowKey;
  readonly above: RowKey;
  readonly why: string;
  /** The relation lifts a lower end only when that end is positive; upper ends pass down in any case. */
  readonly ifPositive: boolean;
}

/** What decides which relations hold. */
export interface OrderHypotheses {
  readonly gns: boolean;
  readonly primitive: boolean;
}

const row = (id: ConstantId): RowKey => (id === 'ge' ? { id, mean: 'logarithmic' } : { id });

/** The order of the constants (§4 of the method): GE ⇒ MLSI ⇒ gap (Carlen & Maas 2017), complete versions below plain ones. */
export function orderRelations({ gns, primitive }: OrderHypotheses): OrderRelation[] {
  const relation = (below: ConstantId, above: ConstantId, why: string, ifPositive = false): OrderRelation => ({
    below: row(below),
    above: row(above),
    why,
    ifPositive,
  });
  const relations = [relation('cbe', 'be', 'cbe ≤ be'), relation('clsi', 'mlsi', 'clsi ≤ mlsi')];
  if (!gns) return relations;
  relations.push(
    relation('cge', 'ge', 'cge ≤ ge'),
    relation('cge', 'cbe', 'cge ≤ cbe'),
    relation('mlsi', 'gap', 'mlsi ≤ gap'),
    relation('cge', 'clsi', 'cge ≤ clsi', true),
    relation('ge', 'gap', 'ge ≤ gap', true),
  );
  if (primitive) relations.push(relation('ge', 'mlsi', 'ge ≤ mlsi', true), relation('lsi', 'mlsi', 'lsi ≤ mlsi'));
  return relations;
}

/** Grades by strength, the strongest first. */
export const GRADE_ORDER: readonly Grade[] = ['exact', 'enclosed', 'certified', 'observed'];

/** The larger of two lower ends; at values equal to rounding the better grade. */
export function betterLower(a: End | null, b: End | null): End | null {
  return prefer(a, b, (x, y) => x > y);
}

/** The smaller of two upper ends; at values equal to rounding the better grade. */
export function betterUpper(a: End | null, b: End | null): End | null {
  return prefer(a, b, (x, y) => x < y);
}

function prefer(a: End | null, b: End | null, beats: (x: number, y: number) => boolean): End | null {
  if (!a || !b) return a ?? b;
  const size = Math.abs(a.value) + Math.abs(b.value);
  const close = a.value === b.value || (size < Infinity && Math.abs(a.value - b.value) <= SAME_VALUE * size);
  if (close && a.grade !== b.grade) return GRADE_ORDER.indexOf(a.grade) < GRADE_ORDER.indexOf(b.grade) ? a : b;
  return beats(b.value, a.value) && !close ? b : a;
}

/** Relative difference below which two ends count as equal when grades decide: a share of CLOSED_TOLERANCE, so that no digit shown changes. */
const SAME_VALUE = CLOSED_TOLERANCE / 4;
