import type { VersionSummary } from '@thalweg/format/api';
import type { Layout } from './layout.js';
import { plainText } from './plain-text.js';

/** One line an example: its name with version, the day, the title as far as it fits. */
export function renderExamples(examples: readonly VersionSummary[], { width, colours }: Layout): string {
  const rows = examples.map((row) => ({ ...row, name: `${row.example}@${row.version}` }));
  const longest = Math.max(0, ...rows.map(({ name }) => name.length));
  return rows
    .map(({ name, publishedAt, title }) => {
      const room = width - longest - 2 - 2 - 10 - 2;
      const text = plainText(title);
      const shown = text.length > room ? `${text.slice(0, Math.max(0, room - 1))}…` : text;
      return `  ${colours.bold(name.padEnd(longest))}  ${publishedAt.slice(0, 10)}  ${shown}`.trimEnd() + '\n';
    })
    .join('');
}
