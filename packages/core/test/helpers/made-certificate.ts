import { expect } from 'vitest';
import { type MadeCertificate, makeCertificate } from '../../src/certificate/make-certificate.js';
import type { Generator } from '../../src/generator/generator.js';
import { analyse } from '../../src/structure/structure.js';

/** The certificate of `cge` that the ladder ends with, and cbe. */
export function madeCertificate(g: Generator): MadeCertificate & { readonly ceiling: number } {
  const { made, ceiling, note } = makeCertificate(analyse(g), 'cge');
  expect(made, note ?? '').not.toBeNull();
  return { ...(made as MadeCertificate), ceiling };
}
