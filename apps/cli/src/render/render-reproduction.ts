import { endValue, type EndDocument, type ReproductionDocument } from '@thalweg/format';
import { constantName } from './constant-name.js';
import type { Layout } from './layout.js';
import { proseWidth } from './layout.js';
import { minus } from './number-text.js';
import { hanging, wrap } from './wrap.js';

type Point = ReproductionDocument['points'][number];
type Claim = Point['claims'][number];
type Difference = Point['differences'][number];

const LABEL = 2 + 'supported'.length + 2;

/** What came out as recorded, what did not, and what became of the claims. */
export function renderReproduction({ example, points, verdict }: ReproductionDocument, layout: Layout): string {
  const { colours } = layout;
  const paint = { same: colours.green, differs: colours.red, undecided: colours.yellow }[verdict];
  const lines = points.flatMap((point) => ['', ...pointLines(point, layout)]);
  const ending = wrap(ENDINGS[verdict], proseWidth(layout), 2);
  return [`  ${colours.bold(`${example.name} ${example.version}`)}`, ...lines, '', ...ending.map(paint), ''].join('\n');
}

const ENDINGS: Record<ReproductionDocument['verdict'], string> = {
  same: 'Reproduced: models are as recorded, brackets too or better, and no claim is refuted.',
  differs: 'Not reproduced: a model or bracket contradicts the record, or a claim is refuted.',
  undecided:
    'Undecided: nothing is contradicted, but a bracket is weaker than recorded, or not recorded, or a claim is open.',
};

function pointLines({ parameters, model, recordedModel, differences, claims }: Point, layout: Layout): string[] {
  const settings = Object.entries(parameters).map(([name, value]) => `${name}=${String(value)}`);
  const head = settings.length === 0 ? 'without parameters' : settings.join(', ');
  return [
    `  ${layout.colours.bold(head)}`,
    ...modelLines(model, recordedModel, layout),
    ...bracketLines(recordedModel, differences, layout),
    ...claims.flatMap((claim) => labelled(claim.state, claimText(claim), layout)),
  ];
}

function modelLines(model: string, recorded: string | null, layout: Layout): string[] {
  if (recorded === null) return labelled('model', `${model}, not recorded`, layout);
  if (recorded === model) return labelled('same', `model ${model}`, layout);
  return labelled('differs', `model ${model}, recorded ${recorded}`, layout);
}

function bracketLines(recorded: string | null, differences: readonly Difference[], layout: Layout): string[] {
  if (recorded === null) return [];
  if (differences.length === 0) return labelled('same', 'every bracket', layout);
  return differences.flatMap((difference) => {
    const { constant, mean, end, change, recorded: before, found } = difference;
    const name = constantName({ id: constant, mean });
    const text = `${name}, ${end} end: ${CHANGES[change]}: ${endText(constant, found)}, recorded ${endText(constant, before)}`;
    return labelled(LABELS[change], text, layout);
  });
}

const CHANGES: Record<Difference['change'], string> = {
  contradicts: 'contradicts the record',
  tighter: 'tighter',
  looser: 'looser',
  'weaker-grade': 'a weaker grade',
  'stronger-grade': 'a stronger grade',
};

const LABELS: Record<Difference['change'], string> = {
  contradicts: 'differs',
  tighter: 'better',
  looser: 'weaker',
  'weaker-grade': 'weaker',
  'stronger-grade': 'better',
};

function endText(constant: Difference['constant'], end: EndDocument | null): string {
  return end === null ? 'unknown' : `${minus(String(endValue(constant, end)))} (${end.grade})`;
}

const RELATIONS: Record<Claim['relation'], string> = { 'at-least': '≥', 'at-most': '≤', equals: '=', 'tends-to': '→' };

function claimText({ constant, mean, relation, value, along, source }: Claim): string {
  const growing = along === undefined ? '' : ` as ${along} grows`;
  return `${constantName({ id: constant, mean })} ${RELATIONS[relation]} ${minus(String(value))}${growing}; ${source}`;
}

function labelled(label: string, text: string, layout: Layout): string[] {
  const { colours } = layout;
  const paint =
    label === 'differs' || label === 'refuted'
      ? colours.red
      : label === 'same' || label === 'proved'
        ? colours.green
        : null;
  const [first = '', ...rest] = hanging(`  ${label}`, text, layout.width, LABEL);
  return [paint === null ? first : first.replace(label, paint), ...rest];
}
