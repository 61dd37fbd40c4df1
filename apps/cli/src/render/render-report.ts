import type { ReportDocument } from '@thalweg/format';
import { decimalColumn } from './decimal-column.js';
import { modelLine } from './model-line.js';
import type { Layout } from './render-sheet.js';
import { wrap } from './wrap.js';

const LABEL = 22;
const SPECTRUM_SHOWN = 12;

/** What `inspect` found, for people. */
export function renderReport(report: ReportDocument, layout: Layout): string {
  const { width, colours } = layout;
  const lines = [
    ...wrap(report.model.title ?? 'Untitled model', width, 2).map((line) => colours.bold(line)),
    ...wrap(modelLine(report.model), width, 2),
    '',
    ...entries(report, layout).flatMap(([label, text]) => entry(label, text, layout)),
    ...jumpLines(report, layout),
    ...spectrumLines(report, layout),
    ...(report.notes ?? []).flatMap((note) => wrap(`note: ${note}`, width, 2)),
    '',
    ...wrap(`digest ${report.model.digest}`, width, 2).map((line) => colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

function entries(report: ReportDocument, { colours }: Layout): [string, string][] {
  const { hermitian, unital, completelyPositive } = report.markov;
  const { residuals } = report.symmetry;
  const answer = (holds: boolean): string => (holds ? colours.green('yes') : colours.red('no'));
  return [
    ['preserves Hermiticity', `${answer(hermitian.holds)}, residual ${short(hermitian.residual)}`],
    ['L(1) = 0', `${answer(unital.holds)}, residual ${short(unital.residual)}`],
    [
      'completely positive',
      `${answer(completelyPositive.holds)}, smallest eigenvalue of the projected Choi matrix ${short(completelyPositive.smallestEigenvalue)}`,
    ],
    [
      'symmetry residuals',
      Object.entries(residuals)
        .map(([name, value]) => `${NAMES[name] ?? name} ${short(value)}`)
        .join(' · '),
    ],
    ['fixed points', report.fixedPoints ? fixedPointText(report.fixedPoints) : 'not found'],
    ['reference state', stateText(report)],
  ];
}

const NAMES: Record<string, string> = { tracial: 'tracial', gns: 'GNS', kms: 'KMS' };

function fixedPointText({ dimension, blocks }: NonNullable<ReportDocument['fixedPoints']>): string {
  return dimension === 1 ? 'multiples of 1 only' : `dimension ${dimension}, blocks [${blocks.join(',')}]`;
}

function stateText({ state }: ReportDocument): string {
  if (state === null) return 'none given';
  const rows = Array.isArray(state) ? state : 're' in state && 'im' in state ? state.re : null;
  if (rows === null || rows.length > 8) return 'in the JSON report';
  const diagonal = rows.map((row, k) => Number((row as readonly number[])[k] ?? 0));
  return `diagonal ${diagonal.map((x) => x.toFixed(6)).join(', ')}`;
}

function jumpLines({ jumps }: ReportDocument, { colours }: Layout): string[] {
  if (jumps === null) return ['', '  no canonical form: the generator is not GNS-symmetric for a faithful state'];
  const frequency = decimalColumn(jumps.map((jump) => fixed(jump.frequency)));
  const norm = decimalColumn(jumps.map((jump) => fixed(jump.norm)));
  const label = Math.max(4, ...jumps.map((jump) => (jump.label ?? '').length));
  return [
    '',
    colours.bold(
      `  ${'jump'.padEnd(label)}  ${'frequency'.padStart(frequency[0]?.length ?? 9)}  ${'norm'.padStart(norm[0]?.length ?? 4)}`,
    ),
    ...jumps.map(
      (jump, k) =>
        `  ${(jump.label ?? '').padEnd(label)}  ${(frequency[k] ?? '').padStart(9)}  ${(norm[k] ?? '').padStart(4)}`,
    ),
  ];
}

function spectrumLines({ spectrum }: ReportDocument, { width, colours }: Layout): string[] {
  if (spectrum === null || spectrum.length === 0) return [];
  const texts = spectrum
    .slice(0, SPECTRUM_SHOWN)
    .map((value) =>
      typeof value === 'number'
        ? fixed(value)
        : `${fixed(value[0])}${value[1] < 0 ? '−' : '+'}${fixed(Math.abs(value[1]))}i`,
    );
  const more = spectrum.length > SPECTRUM_SHOWN ? ` … (${spectrum.length} in all, --json lists them)` : '';
  return ['', colours.bold('  spectrum of −L'), ...wrap(texts.join('  ') + more, width, 4)];
}

function entry(label: string, text: string, { width }: Layout): string[] {
  if (width < 60) return [`  ${label}`, ...wrap(text, width, 4)];
  const [first = '', ...rest] = wrap(text, width, LABEL + 4);
  return [`  ${label.padEnd(LABEL)}  ${first.trimStart()}`, ...rest];
}

/** Six decimals, zero for rounding, a true minus sign. */
function fixed(value: number): string {
  const text = (Math.abs(value) < 5e-7 ? 0 : value).toFixed(6);
  return text.startsWith('-') ? `−${text.slice(1)}` : text;
}

function short(value: number): string {
  if (value === 0) return '0';
  return value.toPrecision(3).replace('-', '−').replace('e−', 'e-').replace('e+', 'e');
}
