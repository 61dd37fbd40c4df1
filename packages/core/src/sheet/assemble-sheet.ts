import { completeCurvatureRule, curvatureRule } from '../constants/curvature-rules.js';
import { diameterUpper } from '../constants/diameter.js';
import type { EntropyResult } from '../constants/entropy-search.js';
import type { GradientEstimateResult } from '../constants/gradient-estimate.js';
import { inheritedEnd } from '../constants/lower-ends.js';
import { lsiFromGap } from '../constants/lsi-lower.js';
import { mixingLower, mixingUpper } from '../constants/mixing.js';
import { entropyUpper } from '../constants/mlsi.js';
import { transportEntropyLower, transportEntropyUpper } from '../constants/transport-entropy.js';
import type { EnclosedEnds } from '../enclosure/enclose-bakry-emery.js';
import type { MeanName } from '../metric/operator-mean.js';
import type { Structure } from '../structure/structure.js';
import type { Bracket, End } from './bracket.js';
import { type SheetRow, closeBrackets, nameOf } from './close-brackets.js';
import { hasGradientMetric } from './hypotheses.js';
import { provedUpper } from './proved-end.js';
import { type RowKey, betterLower, betterUpper, orderRelations } from './order-relations.js';
import { missingEndNotes, rowNotes } from './row-notes.js';
import type { SheetFinding } from './run-sheet-task.js';
import { type SheetRequest, FULL_SHEET } from './sheet-plan.js';

/** Put the findings of all tasks together into rows, pass ends along the order of the constants, and assert that order. */
export function assembleSheet(
  structure: Structure,
  request: SheetRequest,
  findings: readonly (SheetFinding | null)[],
): SheetRow[] {
  const found = findings.filter((finding) => finding !== null);
  const direct = rowKeys(request).map((key) => directRow(structure, request, found, key));
  const relations = orderRelations({
    gns: hasGradientMetric(structure),
    primitive: structure.fixedPoints?.primitive ?? false,
  });
  const scale = gapBracket(found).upper?.value ?? 1;
  const closed = closeBrackets(withLsiLower(structure, direct), relations, scale);
  const derived = closed.map((row) => derivedRow(structure, request, closed, row));
  const final = closeBrackets(derived, relations, scale);
  const byName = new Map(final.map((row) => [nameOf(row.key), row]));
  const t2 = byName.get('t2')?.lower ?? null;
  return request.rows.map((key) => {
    const row = byName.get(nameOf(key)) as SheetRow;
    return { ...row, notes: [...row.notes, ...missingEndNotes(structure, row, t2)] };
  });
}

/** Every row that the findings so far bound, wanted or not. */
export function allRows(structure: Structure, request: SheetRequest, findings: readonly SheetFinding[]): SheetRow[] {
  return assembleSheet(structure, { ...request, rows: rowKeys(request) }, findings);
}

/** The full sheet's rows, for they bound each other, and what is asked beside them. */
function rowKeys(request: SheetRequest): RowKey[] {
  const names = new Set(FULL_SHEET.map(nameOf));
  return [...FULL_SHEET, ...request.rows.filter((key) => !names.has(nameOf(key)))];
}

function directRow(structure: Structure, request: SheetRequest, found: readonly SheetFinding[], key: RowKey): SheetRow {
  const bracket = directBracket(structure, found, key);
  const epsilon = key.id === 'mixing' ? { epsilon: request.epsilon } : {};
  return { key, ...bracket, closed: false, notes: rowNotes(structure, found, key), ...epsilon };
}

function directBracket(structure: Structure, found: readonly SheetFinding[], { id, mean }: RowKey): Bracket {
  switch (id) {
    case 'gap':
      return gapBracket(found);
    case 'cbe':
    case 'be':
      return bakryEmeryBracket(found, id);
    case 'ge':
      return gradientEstimateBracket(structure, found, mean ?? 'logarithmic');
    case 'cge':
      return { lower: completeCurvatureLower(structure, found), upper: null };
    case 'mlsi':
    case 'clsi':
    case 'lsi':
      return entropyBracket(structure, found, id);
    default:
      return { lower: null, upper: null };
  }
}

function gapBracket(found: readonly SheetFinding[]): Bracket {
  const finding = found.find(({ kind }) => kind === 'gap');
  if (finding?.kind !== 'gap') return { lower: null, upper: null };
  if (finding.dense) return eigenvalueBracket(finding.dense, finding.enclosed, 'eigenvalue problem on the algebra');
  if (!finding.lanczos) return { lower: null, upper: null };
  const { value, residual } = finding.lanczos;
  return {
    lower: null,
    upper: {
      value: value + residual,
      grade: 'observed',
      by: 'Lanczos: an eigenvalue lies within the margin',
      margin: residual,
    },
  };
}

interface Eigenvalue {
  readonly value: number;
  readonly margin: number;
}

/** Both ends of an eigenvalue: enclosed where that was proved, else with the margin of its rounding. */
function eigenvalueBracket({ value, margin }: Eigenvalue, enclosed: EnclosedEnds | null, by: string): Bracket {
  const end = (proved: number | null, shift: number): End =>
    proved === null
      ? { value: value + shift, grade: 'certified', by, margin }
      : { value: proved, grade: 'enclosed', by, margin: Math.abs(proved - value) };
  return { lower: end(enclosed?.lower ?? null, -margin), upper: end(enclosed?.upper ?? null, margin) };
}

/** What is left of a bracket whose eigenvalue problem is not decided, or was not solved for all vectors. */
function undecidedBracket({ lower, upper }: Bracket): Bracket {
  return {
    lower: lower?.grade === 'enclosed' ? lower : null,
    upper: upper?.grade === 'enclosed' ? upper : upper && { ...upper, grade: 'observed' },
  };
}

function bakryEmeryBracket(found: readonly SheetFinding[], id: 'be' | 'cbe'): Bracket {
  const finding = found.find(({ kind }) => kind === 'bakry-emery');
  if (finding?.kind !== 'bakry-emery') return { lower: null, upper: null };
  const { complete, plain, enclosed } = finding;
  if (id === 'cbe') {
    const by = 'eigenvalue problem for Γ₂ − KΓ with an ancilla';
    const bracket = eigenvalueBracket(complete, enclosed?.complete ?? null, by);
    return complete.decided ? bracket : undecidedBracket(bracket);
  }
  if (!plain) return { lower: null, upper: null };
  const ends = enclosed?.plain ?? null;
  if (!plain.complete)
    return undecidedBracket(eigenvalueBracket(plain, ends, 'search over pure states and observables'));
  const bracket = eigenvalueBracket(plain, ends, 'eigenvalue problem for Γ₂ − KΓ at one vector, the others alike');
  return plain.decided ? bracket : undecidedBracket(bracket);
}

function gradientEstimateBracket(structure: Structure, found: readonly SheetFinding[], mean: MeanName): Bracket {
  if (!hasGradientMetric(structure)) return { lower: null, upper: null };
  let best: GradientEstimateResult | null = null;
  for (const finding of found) {
    if (finding.kind !== 'ge' || finding.mean !== mean) continue;
    if (!best || finding.result.value + finding.result.error < best.value + best.error) best = finding.result;
  }
  const rule = completeCurvatureLower(structure, found);
  const lower =
    mean === 'logarithmic' ? betterLower(betterLower(rule, curvatureRule(structure)), cellLower(found)) : rule;
  return { lower, upper: provedUpper(structure, best && gradientEstimateEnd(best, mean)) };
}

function cellLower(found: readonly SheetFinding[]): End | null {
  const finding = found.find(({ kind }) => kind === 'cells');
  return finding?.kind === 'cells' ? finding.end : null;
}

function gradientEstimateEnd(best: GradientEstimateResult, mean: MeanName): End {
  return {
    value: best.value + best.error,
    grade: 'observed',
    by: 'search over states, witness kept',
    margin: best.error,
    evidence: {
      constant: 'ge',
      mean,
      value: best.value,
      state: best.state,
      observable: best.observable,
      amplification: 1,
    },
  };
}

/** The better of the theorems on special forms and the lift; both hold for every operator mean. */
function completeCurvatureLower(structure: Structure, found: readonly SheetFinding[]): End | null {
  if (!hasGradientMetric(structure)) return null;
  const lift = found.find(({ kind }) => kind === 'lift');
  return betterLower(completeCurvatureRule(structure), lift?.kind === 'lift' ? lift.end : null);
}

function entropyBracket(structure: Structure, found: readonly SheetFinding[], id: 'mlsi' | 'clsi' | 'lsi'): Bracket {
  const results: EntropyResult[] = [];
  for (const finding of found) {
    if (finding.kind === 'entropy' && finding.result?.constant === id) results.push(finding.result);
  }
  const symmetric = hasGradientMetric(structure) || (id === 'lsi' && structure.symmetry.kind === 'KMS');
  const usesGap = symmetric && (id !== 'lsi' || (structure.fixedPoints?.primitive ?? false));
  const { upper: gap } = gapBracket(found);
  const inherited = usesGap && gap ? inheritedEnd(gap, `${id} ≤ gap; ${gap.by}`) : null;
  const upper = provedUpper(structure, entropyUpper(inherited, results));
  const comparison = found.find(({ kind }) => kind === 'comparison');
  return { lower: id === 'clsi' && comparison?.kind === 'comparison' ? comparison.end : null, upper };
}

/** lsi from the gap by comparison with the projection onto the reference state. */
function withLsiLower(structure: Structure, rows: readonly SheetRow[]): SheetRow[] {
  const gap = rows.find(({ key }) => key.id === 'gap');
  return rows.map((row) =>
    row.key.id === 'lsi' ? { ...row, lower: betterLower(row.lower, lsiFromGap(structure, gap?.lower ?? null)) } : row,
  );
}

/** t2, diameter and mixing rest on the closed rows of mlsi and gap. */
function derivedRow(structure: Structure, request: SheetRequest, rows: readonly SheetRow[], row: SheetRow): SheetRow {
  const mlsi = rows.find(({ key }) => key.id === 'mlsi');
  const gap = rows.find(({ key }) => key.id === 'gap');
  const transport = transportEntropyLower(structure, mlsi?.lower ?? null);
  switch (row.key.id) {
    case 't2':
      return { ...row, lower: transport, upper: transportEntropyUpper(structure, gap?.upper ?? null) };
    case 'diameter':
      return { ...row, upper: betterUpper(row.upper, diameterUpper(structure, transport)) };
    case 'mixing': {
      const symmetric = structure.symmetry.kind !== 'none';
      const lower = symmetric ? mixingLower(structure, request.epsilon, gap?.upper ?? null) : null;
      const ends = { mlsi: mlsi?.lower ?? null, gap: symmetric ? (gap?.lower ?? null) : null };
      return { ...row, lower, upper: mixingUpper(structure, request.epsilon, ends) };
    }
    default:
      return row;
  }
}
