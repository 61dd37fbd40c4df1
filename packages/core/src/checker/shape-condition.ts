import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { CertificateTerm, Condition, LiftCertificate, MatrixEntry } from './lift-certificate.js';
import { doubleOf } from './scalar.js';
import { SCALE_LIMIT } from './tolerances.js';

/** What must be right before anything is computed: blocks, indices, corners, signs and sizes of numbers. */
export function shapeCondition(algebra: BlockAlgebra, certificate: LiftCertificate): Condition {
  const fault = firstFault(algebra, certificate);
  const condition = { name: 'shape of the certificate', kind: 'residual', value: fault ? 1 : 0, limit: 0 } as const;
  return fault ? { ...condition, holds: false, note: fault } : { ...condition, holds: true };
}

function firstFault(
  algebra: BlockAlgebra,
  { blocks, frame, state, jumps, lift, bound }: LiftCertificate,
): string | null {
  if (String(blocks) !== String(algebra.blocks)) {
    return `expected the blocks [${algebra.blocks.join(', ')}] of the model, got [${blocks.join(', ')}]`;
  }
  if (!(Math.abs(doubleOf(bound)) < SCALE_LIMIT)) return 'expected a bound of moderate size';
  if (jumps.length === 0) return 'expected at least one jump, got none';
  const inFrame = frame && entriesFault(algebra, frame);
  if (inFrame) return `frame: ${inFrame}`;
  const inState = entriesFault(algebra, state);
  if (inState) return `state: ${inState}`;
  const corners: [number, number][] = [];
  for (const [j, { entries, rate, ratio, partner }] of jumps.entries()) {
    const fault = entriesFault(algebra, entries);
    if (fault) return `jump ${j}: ${fault}`;
    if (!isScale(doubleOf(rate)) || !isScale(doubleOf(ratio))) return `jump ${j}: expected a positive rate and ratio`;
    if (!(Number.isInteger(partner) && partner >= 0 && partner < jumps.length)) return `jump ${j}: no such partner`;
    const [row, col] = cornerOf(algebra, entries[0]);
    if (entries.some((entry) => String(cornerOf(algebra, entry)) !== `${row},${col}`)) {
      return `jump ${j}: expected entries in one corner of the algebra`;
    }
    corners.push([row, col]);
  }
  const bad = lift.findIndex((term) => !fits(term, corners));
  return bad < 0 ? null : `term ${bad} of the lift: expected jumps whose corners fit together`;
}

function entriesFault({ size }: BlockAlgebra, entries: readonly MatrixEntry[]): string | null {
  if (entries.length === 0) return 'expected at least one entry, got none';
  const seen = new Set<number>();
  for (const [i, j, re, im] of entries) {
    if (!isIndex(i, size) || !isIndex(j, size)) return `expected places below ${size}, got (${i}, ${j})`;
    if (seen.has(i * size + j)) return `expected each place once, got (${i}, ${j}) twice`;
    seen.add(i * size + j);
    const [x, y] = [doubleOf(re), doubleOf(im)];
    if (!(Math.hypot(x, y) < SCALE_LIMIT) || (x === 0 && y === 0))
      return `expected a number other than 0 at (${i}, ${j})`;
  }
  return null;
}

function isIndex(i: number, size: number): boolean {
  return Number.isInteger(i) && i >= 0 && i < size;
}

function isScale(x: number): boolean {
  return x < SCALE_LIMIT && x > 1 / SCALE_LIMIT;
}

function cornerOf({ blockOf }: BlockAlgebra, [i, j]: MatrixEntry): [number, number] {
  return [blockOf[i], blockOf[j]];
}

/** W_left* ζ_from W_right lies in the corner of `to`. */
function fits(
  { left, right, from, to, re, im }: CertificateTerm,
  corners: readonly (readonly [number, number])[],
): boolean {
  const known = (j: number, least: number): boolean => Number.isInteger(j) && j >= least && j < corners.length;
  if (!known(left, -1) || !known(right, -1) || !known(from, 0) || !known(to, 0)) return false;
  if (!(Math.hypot(doubleOf(re), doubleOf(im)) < SCALE_LIMIT)) return false;
  let [row, col] = corners[from];
  if (left >= 0) {
    if (corners[left][0] !== row) return false;
    row = corners[left][1];
  }
  if (right >= 0) {
    if (corners[right][0] !== col) return false;
    col = corners[right][1];
  }
  return corners[to][0] === row && corners[to][1] === col;
}
