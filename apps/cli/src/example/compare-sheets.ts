import {
  endValue,
  type ConstantDocument,
  type EndDocument,
  type ReproductionDocument,
  type SheetDocument,
} from '@thalweg/format';

export type EndDifference = ReproductionDocument['points'][number]['differences'][number];

/** Ends closer than this, relative to the larger of 1 and their size, are the same: searches end there on every machine. */
const SAME_END = 1e-6;

const GRADES = ['observed', 'certified', 'enclosed', 'exact'];

/** How the ends of a sheet differ from the recorded ones, for every constant that the record has. */
export function compareSheets(recorded: SheetDocument, found: SheetDocument): EndDifference[] {
  return recorded.constants.flatMap((row) => {
    const other = found.constants.find(({ id, mean }) => id === row.id && mean === row.mean);
    if (other === undefined) throw new Error(`no row for ${row.id}`);
    return (['lower', 'upper'] as const).flatMap((end) => endDifference(end, row, other) ?? []);
  });
}

function endDifference(end: 'lower' | 'upper', before: ConstantDocument, now: ConstantDocument): EndDifference | null {
  const change = changeOf(end, before, now);
  if (change === null) return null;
  const { id, mean } = before;
  return {
    constant: id,
    ...(mean === undefined ? {} : { mean }),
    end,
    change,
    recorded: withoutEvidence(before[end]),
    found: withoutEvidence(now[end]),
  };
}

function changeOf(
  end: 'lower' | 'upper',
  before: ConstantDocument,
  now: ConstantDocument,
): EndDifference['change'] | null {
  const opposite = end === 'lower' ? 'upper' : 'lower';
  const value = boundOf(end, now);
  const recorded = boundOf(end, before);
  const inward = end === 'lower' ? 1 : -1;
  const beyond = inward * (value - boundOf(opposite, before));
  if (beyond > margin(value)) return 'contradicts';
  if (inward * (recorded - boundOf(opposite, now)) > margin(recorded)) return 'contradicts';
  const step = inward * (value - recorded);
  if (step > margin(value)) return 'tighter';
  if (step < -margin(recorded)) return 'looser';
  const grades = [now[end], before[end]].map((part) => (part === null ? -1 : GRADES.indexOf(part.grade)));
  const [grade = 0, recordedGrade = 0] = grades;
  if (grade === recordedGrade) return null;
  return grade < recordedGrade ? 'weaker-grade' : 'stronger-grade';
}

/** An end that is not known bounds nothing. */
function boundOf(end: 'lower' | 'upper', row: ConstantDocument): number {
  const known = row[end];
  if (known === null) return end === 'lower' ? -Infinity : Infinity;
  return endValue(row.id, known);
}

function margin(value: number): number {
  return Number.isFinite(value) ? SAME_END * Math.max(1, Math.abs(value)) : 0;
}

function withoutEvidence(end: EndDocument | null): EndDocument | null {
  if (end === null) return null;
  const { evidence: _evidence, ...rest } = end;
  return rest;
}
