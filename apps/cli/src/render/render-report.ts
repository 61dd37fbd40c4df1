import type { ReportDocument } from '@thalweg/format';
import { proseWidth, type Layout } from './layout.js';
import { matrixLines } from './matrix-lines.js';
import { blockList, modelHead } from './model-line.js';
import { listNumber, scaleOf, shortNumber } from './number-text.js';
import { jumpTable } from './report-jumps.js';
import { spectrumLines } from './report-spectrum.js';
import { hanging, wrap } from './wrap.js';

const LABEL = 25;
const NARROW = 60;
const MATRIX_INDENT = 4;
const DIAGONAL_SHOWN = 12;

/** What `inspect` found, for people. */
export function renderReport(report: ReportDocument, layout: Layout): string {
  const markov = isMarkov(report);
  const lines = [
    ...modelHead(report.model, layout, { structure: markov }),
    '',
    ...markovPart(report, layout),
    ...(markov ? ['', ...structurePart(report, layout)] : []),
    ...titled('Spectrum of −L', spectrumLines(report, layout, MATRIX_INDENT), layout),
    ...notePart(report, layout),
    '',
    ...wrap(`digest ${report.model.digest}`, layout.width, 2).map((line) => layout.colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

function isMarkov({ markov: { hermitian, unital, completelyPositive } }: ReportDocument): boolean {
  return hermitian.holds && unital.holds && completelyPositive.holds;
}

function markovPart(report: ReportDocument, layout: Layout): string[] {
  const { hermitian, unital, completelyPositive } = report.markov;
  return [
    ...entry('Markov semigroup', isMarkov(report), '', layout),
    ...entry('  L(A*) = L(A)*', hermitian.holds, `residual ${shortNumber(hermitian.residual)}`, layout),
    ...entry('  L(1) = 0', unital.holds, `residual ${shortNumber(unital.residual)}`, layout),
    ...entry('  completely positive', completelyPositive.holds, positivityText(completelyPositive), layout),
  ];
}

function positivityText({ holds, smallestEigenvalue, byForm }: ReportDocument['markov']['completelyPositive']): string {
  if (byForm === true) return 'by its jumps, with rates of at least 0';
  const value = shortNumber(smallestEigenvalue);
  const rounded = holds && smallestEigenvalue < 0 ? `${value}, rounding of 0` : value;
  return `smallest eigenvalue of the projected Choi matrix ${rounded}`;
}

function structurePart(report: ReportDocument, layout: Layout): string[] {
  return [
    ...symmetryPart(report, layout),
    ...entry('Fixed points', null, fixedPointText(report), layout),
    ...statePart(report, layout),
    ...canonicalPart(report, layout),
  ];
}

const SYMMETRIES = { tracial: 'for the trace', gns: 'GNS', kms: 'KMS' } as const;

/** Which of the three hold, by the strongest that does. */
const HOLD: Record<ReportDocument['symmetry']['kind'], readonly string[]> = {
  tracial: ['tracial', 'gns', 'kms'],
  gns: ['gns', 'kms'],
  kms: ['kms'],
  none: [],
};

function symmetryPart({ symmetry: { kind, residuals } }: ReportDocument, layout: Layout): string[] {
  const names = Object.keys(SYMMETRIES) as (keyof typeof SYMMETRIES)[];
  const given = names.filter((name) => residuals[name] !== undefined);
  if (given.length === 0) return entry('Symmetry', null, 'not defined without a faithful invariant state', layout);
  return [
    ...entry('Symmetry', null, kind === 'none' ? 'none' : SYMMETRIES[kind], layout),
    ...given.flatMap((name) =>
      entry(
        `  ${SYMMETRIES[name]}`,
        HOLD[kind].includes(name),
        `residual ${shortNumber(residuals[name] ?? 0)}`,
        layout,
      ),
    ),
  ];
}

function fixedPointText({ fixedPoints, primitive }: ReportDocument): string {
  if (fixedPoints === null) return 'not found';
  const { dimension, blocks } = fixedPoints;
  if (dimension > 1) {
    return blocks.length === 0
      ? `dimension ${dimension}, no algebra`
      : `an algebra of dimension ${dimension} with blocks ${blockList(blocks)}: not primitive`;
  }
  return primitive === true
    ? 'multiples of 1: primitive'
    : 'multiples of 1, but the invariant state is not faithful: not primitive';
}

function statePart({ state }: ReportDocument, layout: Layout): string[] {
  const label = 'Invariant state σ';
  if (state === null) return entry(label, null, 'too large to show', layout);
  const diagonal = Array.isArray(state) ? diagonalOf(state) : null;
  if (diagonal !== null) return entry(label, null, diagonalText(diagonal), layout);
  const lines = matrixLines(state, layout.width, MATRIX_INDENT);
  return lines === null
    ? entry(label, null, 'too large to show, given by --json', layout)
    : [...entry(label, null, '', layout), ...lines];
}

/** The diagonal of a matrix without other entries, else null. */
function diagonalOf(rows: readonly (readonly number[])[]): number[] | null {
  return rows.every((row, i) => row.every((x, j) => i === j || x === 0)) ? rows.map((row, i) => row[i] ?? 0) : null;
}

function diagonalText(values: readonly number[]): string {
  const scale = scaleOf(values);
  const shown = values.slice(0, DIAGONAL_SHOWN).map((value) => listNumber(value, scale));
  const more = values.length > DIAGONAL_SHOWN ? ` … (${values.length} entries, given by --json)` : '';
  return `diagonal ${shown.join(', ')}${more}`;
}

function canonicalPart(report: ReportDocument, layout: Layout): string[] {
  const { jumps, canonicalResidual = 0 } = report;
  if (jumps === null) return entry('Canonical form', null, 'none: it needs GNS symmetry', layout);
  const count = jumps.length === 1 ? '1 jump' : `${jumps.length} jumps`;
  const text = `${count}, from which L is rebuilt with residual ${shortNumber(canonicalResidual)}`;
  return [...entry('Canonical form', null, text, layout), ...jumpTable(report, layout, MATRIX_INDENT)];
}

/** What the table above does not tell already. */
function notePart(report: ReportDocument, layout: Layout): string[] {
  const notes = isMarkov(report) ? (report.notes ?? []) : [];
  return notes.length === 0 ? [] : ['', ...notes.flatMap((note) => wrap(note, proseWidth(layout), 2))];
}

function titled(title: string, lines: readonly string[], { colours }: Layout): string[] {
  return lines.length === 0 ? [] : ['', `  ${colours.bold(title)}`, ...lines];
}

/** A label, an answer where there is one, and more words, which hang below themselves. */
function entry(label: string, holds: boolean | null, text: string, layout: Layout): string[] {
  const { colours, width } = layout;
  const word = holds === null ? '' : holds ? 'yes' : 'no';
  const words = [word, text].filter((part) => part !== '').join(', ');
  const indent = width < NARROW ? 6 : LABEL;
  const [first = '', ...rest] = hanging(`  ${label}`, words, proseWidth(layout), indent);
  const paint = holds === false ? colours.red : colours.green;
  const line = word === '' ? first : first.replace(new RegExp(`(\\s)${word}(,|$)`), (_, a, b) => a + paint(word) + b);
  return [line.trimEnd(), ...rest];
}
