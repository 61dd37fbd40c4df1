import { verdictSchema, type VerdictDocument } from '@thalweg/format';
import { describe, expect, test } from 'vitest';
import { renderVerdict } from '../../src/render/render-verdict.js';
import { bare, coloured, plain } from './support/layouts.js';
import { end, UNBOUNDED } from './support/sheets.js';

type Claim = VerdictDocument['claims'][number];

function verdict(claims: readonly Claim[], more: Partial<VerdictDocument> = {}): VerdictDocument {
  return verdictSchema.parse({
    schema: 'thalweg.verdict/1',
    verb: 'check',
    model: 'b'.repeat(64),
    claims,
    tool: { name: 'thalweg', version: '0' },
    ...more,
  });
}

const claims: readonly Claim[] = [
  {
    constant: 'cge',
    relation: 'at-least',
    value: -0.25,
    verdict: 'holds',
    bracket: { lower: end(0.5, 'a lift', 'exact'), upper: end(0.5, 'cbe') },
  },
  {
    constant: 'ge',
    mean: 'left',
    relation: 'at-most',
    value: 11,
    verdict: 'undecided',
    bracket: { lower: null, upper: end(12.3456, 'search', 'observed') },
  },
  {
    constant: 'cbe',
    relation: 'at-least',
    value: 0,
    verdict: 'refuted',
    bracket: { lower: UNBOUNDED, upper: UNBOUNDED },
  },
];

describe('the answers of check', () => {
  test('are one line a claim in aligned columns, whatever the width', () => {
    const lines = [
      'holds      cge     ≥ −0.25  lower  0.500000000 exact      upper  0.500000000 certified',
      'undecided  ge:left ≤ 11     lower  —                      upper 12.34560     observed',
      'refuted    cbe     ≥ 0      lower −∞           certified  upper −∞           certified',
    ];
    for (const width of [40, 80]) expect(renderVerdict(verdict(claims), plain(width))).toBe(`${lines.join('\n')}\n`);
  });

  test('are coloured by the answer and stay the same text', () => {
    const text = renderVerdict(verdict(claims), coloured());
    expect(text.startsWith('\u001b[32mholds\u001b')).toBe(true);
    expect(bare(text)).toBe(renderVerdict(verdict(claims), plain()));
  });
});

describe('the answer of verify for a witness', () => {
  const claim: Claim = {
    constant: 'ge',
    mean: 'logarithmic',
    relation: 'at-most',
    value: 0.4999999999999998,
    verdict: 'holds',
    bracket: { lower: null, upper: end(0.5, 'witness evaluated afresh') },
  };

  test('says how far off it was', () => {
    const checks = [{ name: 'value of the witness', holds: true, value: 0, bound: 7.36e-15 }];
    expect(renderVerdict(verdict([claim], { verb: 'verify', checks }), plain())).toBe(
      'holds      ge ≤ 0.5000000000: evaluated afresh, off by 0, error bound 7.4e−15\n',
    );
  });

  test('says what the witness gives where that differs', () => {
    const refuted: Claim = { ...claim, value: 0.25, verdict: 'refuted', note: 'the witness gives 0.5, not 0.25' };
    expect(renderVerdict(verdict([refuted], { verb: 'verify' }), plain())).toBe(
      'refuted    ge ≤ 0.2500000000: the witness gives 0.5, not 0.25\n',
    );
  });
});
