import type { Structure } from '../structure/structure.js';
import { narrowEnclosure } from '../witness/enclose-witness.js';
import type { End } from './bracket.js';

/**
 * An upper end with a witness, enclosed where the quotient of the witness is (see `narrowEnclosure`): value and witness then state the
 * upper end of the enclosure. Other ends come back as they are.
 */
export function provedUpper(structure: Structure, end: End | null): End | null {
  if (end?.grade !== 'observed' || !end.evidence) return end;
  const enclosure = narrowEnclosure(structure, end.evidence);
  if (!enclosure) return end;
  const { lo, hi } = enclosure;
  return { ...end, value: hi, grade: 'enclosed', margin: hi - lo, evidence: { ...end.evidence, value: hi } };
}
