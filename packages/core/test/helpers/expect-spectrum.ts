import { generatorMatrix } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { eigenvaluesGeneral } from '../../src/linalg/general-eigenvalues.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

/** Eigenvalues of −L, ascending; they are real for the models here. */
export function spectrum(g: Generator): number[] {
  const { re, im } = eigenvaluesGeneral(generatorMatrix(g), g.algebra.dimension);
  const bound = 1e-7 * (1 + Math.max(...re.map(Math.abs)));
  im.forEach((y) => expectBelow(Math.abs(y), bound, 'imaginary part'));
  return [...re].map((x) => -x).sort((a, b) => a - b);
}

export function expectSpectrum(g: Generator, expected: readonly number[], tolerance = 1e-9): void {
  const sorted = [...expected].sort((a, b) => a - b);
  expectAllClose(spectrum(g), sorted, tolerance * (1 + sorted[sorted.length - 1]), 'eigenvalue');
}

/** k with multiplicity binomial(m,k). */
export function binomialSpectrum(m: number): number[] {
  const list: number[] = [];
  for (let subset = 0; subset < 2 ** m; subset++) list.push(subset.toString(2).replaceAll('0', '').length);
  return list;
}
