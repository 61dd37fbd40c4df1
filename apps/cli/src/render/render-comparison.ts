import type { ComparisonDocument } from '@thalweg/format';
import { boundTexts } from './bound-texts.js';
import { decimalColumn } from './decimal-column.js';
import { proseWidth, type Layout } from './layout.js';
import { modelHead } from './model-line.js';
import { minus, shortNumber } from './number-text.js';
import { hanging, wrap } from './wrap.js';

type Notion = ComparisonDocument['notions'][number];
type Inequality = ComparisonDocument['inequalities'][number];

const GAP = '   ';
const DIGITS = 7;

const NOTION_WORDS: Record<Notion['notion'], string> = {
  gradient: 'gradient estimate',
  evi: 'EVI',
  convexity: 'geodesic convexity',
};

/** A comparison for people: the proved bracket, the three observed constants, the inequalities with their slack. */
export function renderComparison(document: ComparisonDocument, layout: Layout): string {
  const { model, curvature, notions, agree, inequalities, pairs, notes = [] } = document;
  const width = proseWidth(layout);
  const texts = boundTexts('ge', curvature, false);
  const verdict = agree
    ? 'The notions agree within their errors.'
    : 'The notions do not agree within their errors: a search may have missed the lowest value.';
  const lines = [
    ...modelHead(model, layout),
    '',
    ...wrap(`ge, proved from ${texts.lower}; upper end ${texts.upper}`, width, 2).map((line) =>
      layout.colours.bold(line),
    ),
    '',
    ...table([['notion', 'observed', 'error', ''], ...notions.map(notionRow)], layout),
    ...wrap(verdict, width, 2),
    ...(inequalities.length === 0 ? [] : ['', ...inequalityLines(inequalities, layout)]),
    '',
    ...notes.flatMap((note) => wrap(note, width, 2)),
    ...wrap(
      `Observed values are the lowest on ${pairs} random pairs of states and on short geodesics through the witness of ge: upper ends, no bounds from below. Errors are estimated from two discretisations. --json gives the states of each worst case.`,
      width,
      2,
    ).map((line) => layout.colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

function notionRow({ notion, value, error, aboveProved }: Notion): string[] {
  const verdict = aboveProved === null ? '' : aboveProved ? 'not below the proved end' : 'BELOW the proved end';
  return [NOTION_WORDS[notion], minus(value.toPrecision(DIGITS)), shortNumber(error), verdict];
}

function inequalityLines(inequalities: readonly Inequality[], layout: Layout): string[] {
  const rows = inequalities.map(({ name, relative, error, slack, status }) => [
    name,
    shortNumber(slack),
    shortNumber(error),
    `${shortNumber(100 * relative)} %`,
    status,
  ]);
  const width = proseWidth(layout);
  return [
    ...table([['inequality', 'slack', 'error', 'of the right side', ''], ...rows], layout),
    ...inequalities.flatMap(({ name, formula, constant, by }) =>
      hanging(`  ${name}`, `${formula}, with ${minus(constant.toPrecision(DIGITS))}: ${by}`, width, 15).map((line) =>
        layout.colours.dim(line),
      ),
    ),
  ];
}

/** Rows below a head, columns of numbers on their decimal points. */
function table(rows: readonly (readonly string[])[], layout: Layout): string[] {
  const [head = [], ...body] = rows;
  const columns = head.map((title, c) => {
    const texts = body.map((row) => row[c] ?? '');
    const numbers = texts.every((text) => /^[−\d]/.test(text)) ? decimalColumn(texts) : texts;
    const width = Math.max(title.length, ...numbers.map((text) => text.length));
    return [title, ...numbers].map((text) => text.padEnd(width));
  });
  const line = (k: number): string => `  ${columns.map((column) => column[k] ?? '').join(GAP)}`.trimEnd();
  return rows.map((_, k) => (k === 0 ? layout.colours.bold(line(k)) : line(k)));
}
