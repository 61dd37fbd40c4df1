import { describe, it } from 'vitest';
import { adjoint, hermitianPart, multiply, zeros, type ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../../src/linalg/hermitian-eigen.js';
import { choleskyComplex } from '../../../src/linalg/cholesky-complex.js';
import { LanczosBound } from '../../../src/programme/kernels/lanczos-bound.js';
import { seededRandom } from '../../../src/random.js';
import { expectBelow } from '../../linalg/support/expect-close.js';
import { hermitianFamilies, wellConditioned, withSpectrum } from '../../linalg/support/inputs.js';

function flat(a: ComplexMatrix, complex: boolean): Float64Array {
  return complex ? Float64Array.from([...a.re, ...a.im]) : a.re.slice();
}

/** Families whose entries stay within the range of a step direction. */
const SKIPPED = /scaled/;

describe.each([false, true])('LanczosBound, complex: %s', (complex) => {
  it.each([1, 2, 3, 10, 30, 90])('is below the smallest eigenvalue of L⁻¹ D L⁻*, and close, at n = %i', (n) => {
    const random = seededRandom(`bound ${n} ${complex}`);
    const bound = new LanczosBound(n, complex);
    for (const [name, d] of Object.entries(hermitianFamilies(random, n, complex))) {
      if (SKIPPED.test(name)) continue;
      const base = wellConditioned(random, n, complex);
      const l = choleskyComplex(base);
      const exact = hermitianEigenvalues(congruence(l, d))[0];
      const found = bound.smallest(flat(l, complex), flat(d, complex));
      const unit = Math.max(1, Math.abs(exact));
      expectBelow(Math.max(0, found - exact) / unit, 1e-10, `${name}: above the eigenvalue ${exact} by`);
      expectBelow(Math.max(0, exact - found) / unit, 0.02, `${name}: below the eigenvalue ${exact} by`);
    }
  });

  it('finds a single negative eigenvalue among many', () => {
    const n = 120;
    const random = seededRandom('outlier');
    const d = withSpectrum(
      random,
      Array.from({ length: n }, (_, k) => (k === 0 ? -50 : k / n)),
      complex,
    );
    const l = zeros(n);
    for (let i = 0; i < n; i++) l.re[i * n + i] = 1;
    const found = new LanczosBound(n, complex).smallest(flat(l, complex), flat(d, complex));
    expectBelow(Math.abs(found + 50), 0.5, 'distance to −50');
  });
});

/** L⁻¹ D L⁻* by solving with the dense inverse. */
function congruence(l: ComplexMatrix, d: ComplexMatrix): ComplexMatrix {
  const inverse = invertLower(l);
  return hermitianPart(multiply(multiply(inverse, d), adjoint(inverse)));
}

function invertLower(l: ComplexMatrix): ComplexMatrix {
  const n = l.rows;
  const out = zeros(n);
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      let re = Number(i === j);
      let im = 0;
      for (let k = j; k < i; k++) {
        re -= l.re[i * n + k] * out.re[k * n + j] - l.im[i * n + k] * out.im[k * n + j];
        im -= l.re[i * n + k] * out.im[k * n + j] + l.im[i * n + k] * out.re[k * n + j];
      }
      out.re[i * n + j] = re / l.re[i * n + i];
      out.im[i * n + j] = im / l.re[i * n + i];
    }
  }
  return out;
}
