import { completePoint, writeJson, type ExampleDocument, type ModelDocument } from '@thalweg/format';
import { licenceText } from './licence-text.js';

/** What a draft is made of. */
export interface DraftAnswers {
  readonly name: string;
  readonly title: string;
  readonly summary: string;
  readonly author: string;
  readonly orcid: string | null;
  readonly affiliation: string | null;
  readonly licence: string;
}

/** The files of a new example: of a model as it is, or of a small family to start from. */
export function draftFiles(answers: DraftAnswers, model: ModelDocument | null): ReadonlyMap<string, string> {
  const document = draftDocument(answers, model === null);
  return new Map([
    ['example.json', writeJson(document)],
    ['generate.js', model === null ? FAMILY : modelGenerator(model)],
    ['NOTES.md', notes(document)],
    ['LICENSE', licenceText(answers)],
  ]);
}

/** `example.json` of a new example. */
export function draftDocument(answers: DraftAnswers, isFamily: boolean): ExampleDocument {
  const { name, title, summary, author, orcid, affiliation, licence } = answers;
  const parameters = isFamily ? FAMILY_PARAMETERS : [];
  return {
    schema: 'thalweg.example/1',
    name,
    version: '0.1.0',
    title,
    summary,
    licence,
    authors: [{ name: author, ...(orcid === null ? {} : { orcid }), ...(affiliation === null ? {} : { affiliation }) }],
    keywords: [],
    references: [],
    parameters,
    showcase: isFamily ? [completePoint(parameters, {}), completePoint(parameters, { phase: 1 })] : [{}],
  };
}

const FAMILY_PARAMETERS: ExampleDocument['parameters'] = [
  { name: 'flip', type: 'number', range: [0.01, 100], default: 0.5, meaning: 'rate of bit flips, an inverse time' },
  { name: 'phase', type: 'number', range: [0.01, 100], default: 0.5, meaning: 'rate of phase flips, an inverse time' },
];

const FAMILY = `/** The model at the given parameters: here a qubit with bit and phase flips. */
export default ({ flip, phase }) => ({
  schema: 'thalweg.model/1',
  title: 'Bit and phase flips of one qubit',
  algebra: [2],
  generator: {
    form: 'lindblad',
    jumps: [
      { label: 'bit flip', rate: flip, matrix: { pauli: 'X' } },
      { label: 'phase flip', rate: phase, matrix: { pauli: 'Z' } },
    ],
  },
});

/** What is claimed of that model, each with its source. */
export const claims = ({ flip, phase }) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: 2 * Math.min(flip, phase),
    source: 'NOTES.md: the Pauli matrices are the eigenvectors of L',
  },
];
`;

/** A model as a generator without parameters. JSON is JavaScript. */
function modelGenerator(model: ModelDocument): string {
  return `/** The model as it was given. */\nexport default () => (${writeJson(model).trimEnd()});\n`;
}

function notes({ title, summary, parameters }: ExampleDocument): string {
  const family = parameters.length > 0;
  const known = family
    ? `$L(A) = f\\,(XAX - A) + p\\,(ZAZ - A)$ with the rates $f$ = \`flip\` and $p$ = \`phase\`. The Pauli matrices are eigenvectors:
$L(Z) = -2f\\,Z$, $L(X) = -2p\\,X$ and $L(Y) = -2(f+p)\\,Y$. So the gap is $2\\min(f, p)$.`
    : 'Say here what is known of the model, with its proof or source, in TeX: $P_t = e^{tL}$.';
  return `# ${title}

${summary}

## What is known

${known}

## Limits

Bounds hold for the model as given, not for a device.
`;
}
