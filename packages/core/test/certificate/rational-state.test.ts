import { describe, expect, it } from 'vitest';
import { draftCertificate } from '../../src/certificate/draft-certificate.js';
import { rationalDraft } from '../../src/certificate/rational-draft.js';
import { rationalState } from '../../src/certificate/rational-state.js';
import { RATIONAL_ONE, addRational, multiplyRational } from '../../src/checker/arithmetic/rational.js';
import type { LiftCertificate } from '../../src/checker/lift-certificate.js';
import { doubleOf, rationalOf } from '../../src/checker/scalar.js';
import { completeGraph, thermalQubit, truncatedOscillator } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import type { FoundLift } from '../../src/lift/find-lift.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import { analyse } from '../../src/structure/structure.js';
import { expectWithin } from '../helpers/bracket-of.js';

/** The canonical form written down, without a lift. */
function draftOf(g: Generator): LiftCertificate {
  const lift: Pick<FoundLift, 'curvature' | 'coefficients'> = { curvature: 0, coefficients: [] };
  return draftCertificate(analyse(g).canonical as CanonicalForm, lift as FoundLift);
}

describe.each<[string, Generator]>([
  ['a thermal qubit', thermalQubit({ beta: 1 })],
  ['an oscillator of four levels, one frequency on three steps', truncatedOscillator({ levels: 4, beta: 0.7 })],
  ['a complete graph', completeGraph(3)],
])('the rational state of %s', (_, g) => {
  const draft = draftOf(g);

  it('has trace 1, is near the one given, and has the jumps as modular eigenvectors exactly', () => {
    const state = rationalState(draft);
    const sigma = (state?.entries ?? []).map(([, , re]) => rationalOf(re));
    expect(sigma.reduce(addRational)).toEqual(RATIONAL_ONE);
    for (const [i, , re] of draft.state) expectWithin(doubleOf(sigma[i]), doubleOf(re), 1e-14, `σ_${i}`);
    draft.jumps.forEach(({ entries }, j) => {
      const ratio = state?.ratios[j] ?? RATIONAL_ONE;
      for (const [a, b, re, im] of entries) {
        if (Math.hypot(doubleOf(re), doubleOf(im)) < 1e-12) continue;
        expect(multiplyRational(ratio, sigma[a])).toEqual(sigma[b]);
      }
    });
  });

  it('gives a draft in detailed balance exactly', () => {
    const { jumps } = rationalDraft(draft, 'double') as LiftCertificate;
    jumps.forEach(({ rate, ratio, partner }) => {
      const other = jumps[partner];
      expect(multiplyRational(rationalOf(rate), rationalOf(ratio))).toEqual(rationalOf(other.rate));
      expect(multiplyRational(rationalOf(other.ratio), rationalOf(ratio))).toEqual(RATIONAL_ONE);
    });
  });
});

it('there is none for a state that is not diagonal, nor a rational draft', () => {
  const draft = draftOf(thermalQubit({ beta: 1 }));
  const turned: LiftCertificate = { ...draft, state: [...draft.state, [0, 1, 0.01, 0], [1, 0, 0.01, 0]] };
  expect(rationalState(turned)).toBeNull();
  expect(rationalDraft(turned, 'double')).toBeNull();
});

it('an irrational rate has no rational draft without doubles', () => {
  expect(rationalDraft(draftOf(thermalQubit({ beta: 1 })))).toBeNull();
});
