/** A valid `example.json`, with changes. */
export function exampleDocument(changes: Record<string, unknown> = {}): Record<string, unknown> {
  return {
    schema: 'thalweg.example/1',
    name: 'two-rates',
    version: '1.0.0',
    title: 'Two rates',
    summary: 'A chain of two points.',
    licence: 'MIT',
    authors: [{ name: 'Ada Example', orcid: '0000-0002-1825-0097', affiliation: 'Institute of Examples' }],
    keywords: ['chain'],
    references: [{ doi: '10.1016/j.jfa.2017.05.003' }, { arxiv: '1609.01254', cites: 'Carlen & Maas 2017' }],
    parameters: [
      { name: 'n', type: 'integer', range: [2, 6], default: 2, meaning: 'number of points' },
      { name: 'g', type: 'number', range: [0, 2], default: 0.5, meaning: 'rate' },
      { name: 'kind', type: 'choice', choices: ['ring', 'line'], default: 'line', meaning: 'graph' },
      { name: 'loops', type: 'boolean', default: false, meaning: 'whether points have loops' },
    ],
    showcase: [{}, { n: 3, kind: 'ring' }],
    ...changes,
  };
}

/** The files of a valid package, with changes; null leaves one out. */
export function exampleFiles(changes: Record<string, string | Uint8Array | null> = {}): Map<string, Uint8Array> {
  const files: Record<string, string | Uint8Array | null> = {
    'example.json': JSON.stringify(exampleDocument()),
    'generate.js': 'export default () => ({});\n',
    'NOTES.md': '# Notes\n',
    LICENSE: 'MIT\n',
    ...changes,
  };
  const bytes = (content: string | Uint8Array) => (typeof content === 'string' ? utf8(content) : content);
  return new Map(
    Object.entries(files).flatMap(([name, content]) => (content === null ? [] : [[name, bytes(content)]])),
  );
}

export function utf8(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}
