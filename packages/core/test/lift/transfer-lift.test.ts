import { expect, it } from 'vitest';
import { draftCertificate } from '../../src/certificate/draft-certificate.js';
import { checkCertificate } from '../../src/checker/check-certificate.js';
import { dephasing } from '../../src/families/index.js';
import { findLift } from '../../src/lift/find-lift.js';
import { inJumpBasis } from '../../src/lift/jump-bases.js';
import { transferLift } from '../../src/lift/transfer-lift.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import { analyse } from '../../src/structure/structure.js';
import { expectWithin } from '../helpers/bracket-of.js';

it('a lift over Weyl jumps, written over the given ones, passes with the same bound, and there and back is the same', () => {
  const g = dephasing(3);
  const given = analyse(g).canonical as CanonicalForm;
  const weyl = inJumpBasis(given, 'weyl') as CanonicalForm;
  const lift = findLift(weyl, 'full', { maxUnknowns: 100 });
  if (!lift) throw new Error('expected a lift, got none');
  const there = transferLift(lift.coefficients, weyl, given);
  const verdict = checkCertificate(g, draftCertificate(given, { ...lift, coefficients: there }));
  expect(verdict.conditions.filter(({ holds }) => !holds)).toEqual([]);
  expectWithin(verdict.bound, lift.curvature, 1e-11, 'bound');
  const back = transferLift(there, given, weyl);
  for (const { term, re, im } of lift.coefficients) {
    const same = back.find((each) => JSON.stringify(each.term) === JSON.stringify(term));
    expectWithin(same?.re ?? 0, re, 1e-11, 're');
    expectWithin(same?.im ?? 0, im, 1e-11, 'im');
  }
});
