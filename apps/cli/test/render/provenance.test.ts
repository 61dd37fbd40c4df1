import { expect, test } from 'vitest';
import { provenance } from '../../src/render/provenance.js';
import { end, row, UNBOUNDED } from './support/sheets.js';

const LIFT = 'lift of ∂ (full form, jumps as given)';
const cge = row('cge', end(1, LIFT), end(2, 'cge ≤ cbe; a problem'));
const ge = row('ge', end(1, LIFT), end(2, 'search'));
const cbe = row('cbe', end(1, `cge ≤ cbe; ${LIFT}`), end(2, 'a problem'));
const mlsi = row('mlsi', end(1, `ge ≤ mlsi; ${LIFT}`), end(2, 'search'));
const t2 = row('t2', end(1, `mlsi (primitive): ge ≤ mlsi; ${LIFT}`), null);
const rows = [cge, ge, cbe, mlsi, t2];

test('a chain is cut where it reaches another row', () => {
  const shown = rows.map((each) => each.lower && provenance(each.lower, each, rows));
  expect(shown).toEqual([LIFT, LIFT, 'cge ≤ cbe', 'ge ≤ mlsi', 'mlsi (primitive)']);
  expect(cge.upper && provenance(cge.upper, cge, rows)).toBe('cge ≤ cbe');
});

test('a chain stays whole where its source is not on the sheet', () => {
  expect(t2.lower && provenance(t2.lower, t2, [t2])).toBe(`mlsi (primitive): ge ≤ mlsi; ${LIFT}`);
  expect(t2.lower && provenance(t2.lower, t2, [t2, ge])).toBe('mlsi (primitive): ge ≤ mlsi');
  // cge has the same proof, but the chain does not pass through it.
  expect(mlsi.lower && provenance(mlsi.lower, mlsi, [mlsi, cge])).toBe(`ge ≤ mlsi; ${LIFT}`);
});

test('an unbounded end is explained by its note', () => {
  const unbounded = row('cbe', UNBOUNDED, UNBOUNDED);
  const below = row('cge', null, { ...UNBOUNDED, note: `cge ≤ cbe; ${UNBOUNDED.note}` });
  expect(provenance(UNBOUNDED, unbounded, [unbounded])).toBe('an eigenvalue problem');
  expect(below.upper && provenance(below.upper, below, [unbounded, below])).toBe('cge ≤ cbe');
});
