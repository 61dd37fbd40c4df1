import type { VersionDocument } from '@thalweg/format/api';
import { proseWidth, type Layout } from './layout.js';
import { plainText } from './plain-text.js';
import { wrap } from './wrap.js';

/** A published version: title, authors, summary, parameters, files, digest. */
export function renderVersion(version: VersionDocument, layout: Layout): string {
  const { colours } = layout;
  const { document } = version;
  const authors = document.authors.map(({ name, affiliation }) => (affiliation ? `${name} (${affiliation})` : name));
  const rows = [
    ['authors', authors.join('; ')],
    ['licence', document.licence],
    ['published', `${version.publishedAt.slice(0, 10)} by ${version.publishedBy}${version.listed ? '' : ', unlisted'}`],
    ...(version.withdrawn ? [['withdrawn', `${version.withdrawn.at.slice(0, 10)}: ${version.withdrawn.because}`]] : []),
    ...document.parameters.map(({ name, meaning }) => ['parameter', `${name}: ${meaning}`]),
    ['files', version.files.map(({ path }) => path).join('  ')],
    ['sha256', version.digest],
  ];
  const lines = rows.flatMap(([label = '', text = '']) => {
    const [first = '', ...rest] = wrap(plainText(text), proseWidth(layout), LABEL);
    return [`  ${label.padEnd(LABEL - 2)}${first.trimStart()}`, ...rest];
  });
  return [
    `  ${colours.bold(`${version.example}@${version.version}`)}  ${plainText(document.title)}`,
    '',
    ...wrap(plainText(document.summary), proseWidth(layout), 2),
    '',
    ...lines,
    '',
  ].join('\n');
}

const LABEL = 13;
