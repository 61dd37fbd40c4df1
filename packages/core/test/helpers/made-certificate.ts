import { expect } from 'vitest';
import { type MadeCertificate, makeCertificate } from '../../src/certificate/make-certificate.js';
import type { Generator } from '../../src/generator/generator.js';
import { draftCertificate } from '../../src/certificate/draft-certificate.js';
import type { LiftCertificate } from '../../src/checker/lift-certificate.js';
import { findLift } from '../../src/lift/find-lift.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import { analyse } from '../../src/structure/structure.js';

/** The certificate of `cge` that the ladder ends with, and cbe. */
export function madeCertificate(g: Generator): MadeCertificate & { readonly ceiling: number } {
  const { made, ceiling, note } = makeCertificate(analyse(g), 'cge');
  expect(made, note ?? '').not.toBeNull();
  return { ...(made as MadeCertificate), ceiling };
}

/** The lift of the small ansatz as it leaves the solver, written down in floating point. */
export function roundedCertificate(g: Generator): LiftCertificate {
  const canonical = analyse(g).canonical as CanonicalForm;
  const lift = findLift(canonical, 'diagonal', { maxUnknowns: 100 });
  expect(lift).not.toBeNull();
  return draftCertificate(canonical, lift as NonNullable<typeof lift>);
}
