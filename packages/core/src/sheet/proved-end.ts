import { ENCLOSURE_WIDTH } from '../enclosure/limits.js';
import type { Structure } from '../structure/structure.js';
import { CLOSED_FLOOR } from '../tolerances.js';
import { encloseWitness } from '../witness/enclose-witness.js';
import type { End } from './bracket.js';

/**
 * An upper end with a witness, enclosed where interval arithmetic encloses its quotient to ENCLOSURE_WIDTH of itself (at least of
 * CLOSED_FLOOR times the gap): value and witness then state the upper end of the enclosure. Other ends come back as they are.
 */
export function provedUpper(structure: Structure, end: End | null, gap: number): End | null {
  if (end?.grade !== 'observed' || !end.evidence) return end;
  const enclosure = encloseWitness(structure, end.evidence);
  if (!enclosure) return end;
  const { lo, hi } = enclosure;
  const scale = Math.max(Math.abs(hi), Number.isFinite(gap) ? CLOSED_FLOOR * gap : 0);
  if (!(hi - lo <= ENCLOSURE_WIDTH * scale)) return end;
  return { ...end, value: hi, grade: 'enclosed', margin: hi - lo, evidence: { ...end.evidence, value: hi } };
}
