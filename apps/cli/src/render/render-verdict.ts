import type { VerdictDocument } from '@thalweg/format';
import { boundTexts } from './bound-texts.js';
import { constantName } from './constant-name.js';
import { decimalColumn } from './decimal-column.js';
import type { Layout } from './layout.js';
import { minus, shortNumber } from './number-text.js';

type ClaimVerdict = VerdictDocument['claims'][number];

const ANSWER = 'undecided'.length + 2;

/** Ends closer than this, relative, are shown with the digits of a closed bracket. */
const CLOSE_ENDS = 1e-8;

/** One line for each claim: the answer, the claim, and what decides it. */
export function renderVerdict(verdict: VerdictDocument, layout: Layout): string {
  const lines = verdict.verb === 'verify' ? witnessLines(verdict, layout) : claimLines(verdict.claims, layout);
  return `${lines.join('\n')}\n`;
}

/** Columns are aligned over all claims and lines are never broken, so that a log can be read and searched line by line. */
function claimLines(claims: readonly ClaimVerdict[], layout: Layout): string[] {
  const texts = claims.map((claim) => boundTexts(claim.constant, claim.bracket, isNarrow(claim)));
  const names = padded(claims.map(({ constant: id, mean }) => constantName({ id, mean })));
  const bounds = padded(claims.map(({ relation, value }) => `${sign(relation)} ${minus(String(value))}`));
  const lower = decimalColumn(texts.map((text) => text.lower));
  const upper = decimalColumn(texts.map((text) => text.upper));
  const lowerGrade = padded(claims.map(({ bracket }) => bracket.lower?.grade ?? ''));
  return claims.map((claim, k) => {
    const ends = `lower ${lower[k]} ${lowerGrade[k]}  upper ${upper[k]} ${claim.bracket.upper?.grade ?? ''}`;
    return painted(`${claim.verdict.padEnd(ANSWER)}${names[k]} ${bounds[k]}  ${ends}`.trimEnd(), claim.verdict, layout);
  });
}

/** What a witness was found to show. */
function witnessLines({ claims, checks = [] }: VerdictDocument, layout: Layout): string[] {
  return claims.map(({ constant: id, mean, value, verdict, note, bracket }) => {
    const [check] = checks;
    const size =
      check?.value === undefined
        ? ''
        : `, off by ${shortNumber(check.value)}, error bound ${shortNumber(check.bound ?? 0)}`;
    const how = bracket.upper?.grade === 'enclosed' ? ' in interval arithmetic' : size;
    const found = note ?? `evaluated afresh${how}`;
    const name = constantName({ id, mean });
    const line = `${verdict.padEnd(ANSWER)}${name} ≤ ${minus(value.toPrecision(10))}: ${found}`;
    return painted(line, verdict, layout);
  });
}

function painted(line: string, verdict: ClaimVerdict['verdict'], { colours }: Layout): string {
  const paint = { holds: colours.green, refuted: colours.red, undecided: colours.yellow }[verdict];
  return paint(verdict) + line.slice(verdict.length);
}

function isNarrow({ bracket: { lower, upper } }: ClaimVerdict): boolean {
  const low = lower?.value ?? null;
  const high = upper?.value ?? null;
  if (low === null || high === null) return false;
  return Math.abs(high - low) <= CLOSE_ENDS * Math.max(Math.abs(low), Math.abs(high));
}

function sign(relation: ClaimVerdict['relation']): string {
  return relation === 'at-least' ? '≥' : '≤';
}

function padded(texts: readonly string[]): string[] {
  const width = Math.max(0, ...texts.map((text) => text.length));
  return texts.map((text) => text.padEnd(width));
}
