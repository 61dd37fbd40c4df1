import { endValue, type ConstantDocument, type EndDocument } from '@thalweg/format';
import { constantName } from './constant-name.js';
import { differences, rowOf, type SweepResult, type SweptConstant } from './sweep-result.js';

/** A sweep as comma-separated values (RFC 4180, lines ended by a line feed): one line a point, all digits, an unknown end empty. */
export function sweepCsv(result: SweepResult): string {
  const { points, sweep } = result;
  const names = Object.keys(points[0]?.parameters ?? {});
  const groups = sweep.constants.map((constant) => groupOf(result, constant));
  const head = [...names, ...groups.flatMap(({ heads }) => heads), 'model', 'error'];
  const lines = points.map((point, k) => [
    ...names.map((name) => String(point.parameters[name])),
    ...groups.flatMap(({ cells }) => cells[k] ?? []),
    point.sheet?.model.digest ?? '',
    point.error?.message ?? '',
  ]);
  return [head, ...lines].map((line) => `${line.map(field).join(',')}\n`).join('');
}

function groupOf(result: SweepResult, constant: SweptConstant) {
  const name = constantName(constant);
  const changes = differences(result, constant);
  const ends = ['lower', 'lower_grade', 'upper', 'upper_grade', 'closed'];
  const heads = [...ends, ...(changes === null ? [] : ['difference', 'to_limit'])].map((end) => `${name}_${end}`);
  const cells = result.points.map((point, k) => {
    const change = changes?.[k];
    return [
      ...endCells(rowOf(point, constant)),
      ...(change === undefined ? [] : [numberCell(change.toPrevious), numberCell(change.toLimit)]),
    ];
  });
  return { heads, cells };
}

function endCells(row: ConstantDocument | undefined): string[] {
  if (row === undefined) return ['', '', '', '', ''];
  const cells = (end: EndDocument | null) => [numberCell(end && endValue(row.id, end)), end?.grade ?? ''];
  return [...cells(row.lower), ...cells(row.upper), String(row.closed)];
}

function numberCell(value: number | null): string {
  if (value === null) return '';
  return Number.isFinite(value) ? String(value) : value > 0 ? 'inf' : '-inf';
}

function field(text: string): string {
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
