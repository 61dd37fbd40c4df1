import { packArchive } from '@thalweg/format';

/** An archive of a small example package, with some of its description changed. */
export function exampleArchive(changes: Readonly<Record<string, unknown>> = {}): Uint8Array {
  const document = {
    schema: 'thalweg.example/1',
    name: 'two-point-chain',
    version: '1.0.0',
    title: 'Two points with unequal rates',
    summary: 'A reversible chain on two points.',
    licence: 'MIT',
    authors: [{ name: 'Mira Tolland' }],
    keywords: ['chain'],
    references: [],
    parameters: [],
    showcase: [{}],
    ...changes,
  };
  const text = (content: string): Uint8Array => new TextEncoder().encode(content);
  return packArchive(
    new Map([
      ['example.json', text(JSON.stringify(document))],
      ['generate.js', text('export default (parameters, kit) => kit.rates([[0, 1], [2, 0]]);\n')],
      ['NOTES.md', text('# Two points\n')],
      ['LICENSE', text('MIT\n')],
    ]),
  );
}
