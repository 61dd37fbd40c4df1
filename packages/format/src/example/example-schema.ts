import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import { EXAMPLE_LIMITS } from '../limits.js';
import { oneOf, strict, text, textThat, withoutFault } from '../schema/fields.js';
import { isLicence } from './licence.js';
import { isOrcid } from './orcid.js';
import { findPointFault } from './parameter-point.js';
import { parameterSchema } from './parameter-schema.js';
import { isVersion } from './version.js';

/** The name of an example: what stands behind the slash of `owner/slug`. */
const EXAMPLE_NAME = /^(?=.{2,64}$)[a-z0-9]+(-[a-z0-9]+)*$/;

/** One line of text. */
const line = text.regex(/^[^\r\n]*\S[^\r\n]*$/, 'expected one line of text');

const orcid = textThat(isOrcid, 'an ORCID iD such as 0000-0002-1825-0097, its last digit the check digit');

const authorSchema = strict({ name: line, orcid: orcid.optional(), affiliation: line.optional() });

/** The suffix may hold any printable character (ISO 26324); a resolver's address in front is refused. */
const doi = z.string().regex(/^10\.\d{4,9}\/[!-~]+$/, 'expected a bare DOI such as 10.1016/j.jfa.2017.05.003');

const arxiv = z
  .string()
  .regex(/^(\d{4}\.\d{4,5}|[a-z-]+(\.[A-Z]{2})?\/\d{7})(v\d+)?$/, 'expected an arXiv number such as 1609.01254');

const referenceSchema = oneOf('a reference: {"doi": "10.…"} or {"arxiv": "1609.01254"}', [
  strict({ doi, cites: line.optional() }),
  strict({ arxiv, cites: line.optional() }),
]);

/** Values of some parameters; the others have their defaults. */
const pointSchema = z.record(
  z.string(),
  oneOf('a number, a text, true or false', [z.number(), z.string(), z.boolean()]),
);

const fields = strict({
  schema: z.literal('thalweg.example/1'),
  name: z
    .string()
    .regex(EXAMPLE_NAME, 'expected a name of 2 to 64 characters a-z, 0-9 and single hyphens between them'),
  version: textThat(isVersion, 'a version such as 1.0.0 (SemVer 2.0.0, without build metadata)'),
  title: line,
  summary: text.min(1),
  licence: textThat(isLicence, 'an SPDX licence expression such as MIT or CC-BY-4.0'),
  authors: z.array(authorSchema).min(1).max(EXAMPLE_LIMITS.authors),
  keywords: z.array(line).max(EXAMPLE_LIMITS.keywords),
  references: z.array(referenceSchema).max(EXAMPLE_LIMITS.references),
  parameters: z.array(parameterSchema).max(EXAMPLE_LIMITS.parameters),
  /** Points whose sheets are always computed. */
  showcase: z.array(pointSchema).min(1).max(EXAMPLE_LIMITS.showcases),
});

export type ExampleDocument = z.infer<typeof fields>;

/** What an example is and which parameters it takes, `thalweg.example/1`. */
export const exampleSchema = withoutFault(fields, findExampleFault);

function findExampleFault({ parameters, showcase }: ExampleDocument): Fault | null {
  const names = parameters.map(({ name }) => name);
  const repeated = names.findIndex((name, k) => names.indexOf(name) < k);
  if (repeated >= 0) {
    const message = `expected each parameter once, got "${names[repeated]}" again; rename one of them`;
    return fault('wrong-schema', message, ['parameters', repeated, 'name']);
  }
  for (const [k, point] of showcase.entries()) {
    const found = findPointFault(parameters, point);
    if (found) return { ...found, path: ['showcase', k, ...found.path] };
  }
  return null;
}
