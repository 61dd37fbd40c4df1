import type { VerdictDocument } from '@thalweg/format';
import type { Layout } from './layout.js';
import { wrap } from './wrap.js';

const COLUMN = 'refused'.length + 2;

/** What a certificate proves, and one line for each condition with its margin. */
export function renderCertificateVerdict({ claims, checks = [] }: VerdictDocument, { width, colours }: Layout): string {
  const lines = claims.flatMap(({ constant, value, bracket: { lower }, note }) => {
    const proved = lower ? `${plain(lower.value ?? -Infinity)}, ${lower.grade}` : plain(value);
    const text = `${constant} ≥ ${proved}${note === undefined ? '' : `; ${note}`}`;
    return labelled(lower ? 'proved' : 'refused', text, width, lower ? colours.green : colours.red);
  });
  for (const { name, holds, value, bound = 0, relation, note } of checks) {
    const sign = relation === 'at-least' ? '≥' : '≤';
    const size = value === undefined ? '' : `: ${short(value)}, must be ${sign} ${short(bound)}`;
    const text = `${name}${size}${note === undefined ? '' : ` (${note})`}`;
    lines.push(...labelled(holds ? 'holds' : 'fails', text, width, holds ? colours.green : colours.red));
  }
  return `${lines.join('\n')}\n`;
}

/** A coloured word, and text in the column beside it. */
function labelled(word: string, text: string, width: number, paint: (text: string) => string): string[] {
  const [first = '', ...rest] = wrap(text, width, COLUMN);
  return [`${paint(word)}${' '.repeat(COLUMN - word.length)}${first.trimStart()}`, ...rest];
}

function plain(x: number): string {
  return String(x).replace('-', '−');
}

function short(x: number): string {
  return x === 0 ? '0' : x.toPrecision(3).replaceAll('-', '−');
}
