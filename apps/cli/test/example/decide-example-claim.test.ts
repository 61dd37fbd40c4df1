import type { ClaimDocument, ConstantDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { claimValue } from '../../src/example/claim-value.js';
import { decideExampleClaim } from '../../src/example/decide-example-claim.js';
import { end, row } from '../render/support/sheets.js';

const claim = (relation: ClaimDocument['relation'], value: number): ClaimDocument => ({
  constant: 'mlsi',
  relation,
  value,
  source: 'by hand',
  ...(relation === 'tends-to' && { along: 'n' }),
});
const open = row('mlsi', end(1, 'l'), end(2, 'u', 'observed'));
const closed = row('mlsi', end(1, 'l'), end(1, 'u'), { closed: true });
const unknown = row('mlsi', null, null);

test.each<[string, number, ConstantDocument, string]>([
  ['at-least', 1, open, 'proved'],
  ['at-least', 1 + 1e-12, open, 'proved'],
  ['at-least', 1.5, open, 'supported'],
  ['at-least', 2, open, 'supported'],
  ['at-least', 2.1, open, 'refuted'],
  ['at-least', 1, unknown, 'open'],
  ['at-most', 2, open, 'proved'],
  ['at-most', 1.5, open, 'open'],
  ['at-most', 0.9, open, 'refuted'],
  ['equals', 1, closed, 'proved'],
  ['equals', 2, open, 'supported'],
  ['equals', 1.5, open, 'open'],
  ['equals', 0.9, open, 'refuted'],
  ['equals', 2.1, open, 'refuted'],
  ['equals', 1.1, closed, 'refuted'],
  ['equals', 1, unknown, 'open'],
  ['tends-to', 7, closed, 'limit'],
])('%s %d', (relation, value, bracket, state) => {
  expect(decideExampleClaim(claim(relation as ClaimDocument['relation'], value), bracket, 'two-alpha').state).toBe(
    state,
  );
});

test('a value is read in its own convention', () => {
  const oneAlpha = { ...claim('equals', 2), convention: 'one-alpha' } as const;
  expect(claimValue(oneAlpha, 'two-alpha')).toBe(1);
  expect(claimValue(oneAlpha, 'four-alpha')).toBe(0.5);
  expect(claimValue({ ...oneAlpha, constant: 'gap' }, 'two-alpha')).toBe(2);
  expect(decideExampleClaim(oneAlpha, closed, 'two-alpha').state).toBe('proved');
});
