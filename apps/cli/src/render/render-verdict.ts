import { bracketText } from '@thalweg/core';
import type { VerdictDocument } from '@thalweg/format';
import type { Layout } from './render-sheet.js';
import { wrap } from './wrap.js';

type ClaimVerdict = VerdictDocument['claims'][number];

/** One line per claim: the answer, the claim, and the bracket that decides it. */
export function renderVerdict(verdict: VerdictDocument, layout: Layout): string {
  const lines = verdict.claims.flatMap((claim) => claimLines(claim, layout));
  for (const check of verdict.checks ?? []) {
    const size =
      check.value === undefined
        ? ''
        : `: off by ${check.value.toPrecision(3)}, error bound ${(check.bound ?? 0).toPrecision(3)}`;
    lines.push(...wrap(`${check.holds ? 'agrees' : 'differs'}  ${check.name}${size}`, layout.width, 2));
  }
  return `${lines.join('\n')}\n`;
}

function claimLines(claim: ClaimVerdict, { width, colours }: Layout): string[] {
  const paint = { holds: colours.green, refuted: colours.red, undecided: colours.yellow }[claim.verdict];
  const name =
    claim.mean !== undefined && claim.mean !== 'logarithmic' ? `${claim.constant}:${claim.mean}` : claim.constant;
  const sign = claim.relation === 'at-least' ? '≥' : '≤';
  const { lower, upper } = bracketText(claim.bracket.lower, claim.bracket.upper, false);
  const grades = [claim.bracket.lower?.grade, claim.bracket.upper?.grade].map((grade) => grade ?? 'nothing known');
  const text = `${name} ${sign} ${claim.value}   lower ${lower ?? '—'} (${grades[0]}), upper ${upper ?? '—'} (${grades[1]})`;
  const [first = '', ...rest] = wrap(text, width, 11);
  const note = claim.note === undefined ? [] : wrap(`note: ${claim.note}`, width, 11).map((line) => colours.dim(line));
  return [`${paint(claim.verdict.padEnd(9))}  ${first.trimStart()}`, ...rest, ...note];
}
