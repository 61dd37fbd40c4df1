import { fromCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import { type UnitForm, unitForm } from '../generator/unit-form.js';
import {
  type ComplexMatrix,
  frobeniusNorm,
  fromEntries,
  hermiticityResidual,
  identity,
} from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { seededRandom } from '../random.js';
import { INPUT_TOLERANCE, POSITIVITY_TOLERANCE } from '../tolerances.js';

/** What makes L the generator of a Markov semigroup. */
export interface MarkovChecks {
  /** L(A*) = L(A)*; residual relative to ‖L‖ on a random Hermitian A. */
  readonly hermitian: { readonly holds: boolean; readonly residual: number };
  /** L(1) = 0; residual ‖L(1)‖_F/(‖L‖·‖1‖_F). */
  readonly unital: { readonly holds: boolean; readonly residual: number };
  /**
   * e^{tL} completely positive for t ≥ 0: the least eigenvalue (a rate) of the Choi-type matrices [L(e_kk')]_{ll'}, taken in each
   * pair of blocks, orthogonal to the identity where the blocks are the same (Lindblad 1976; Evans 1977).
   */
  readonly completelyPositive: {
    readonly holds: boolean;
    readonly smallestEigenvalue: number;
    /** True when it follows from the form, jumps with rates ≥ 0, and no eigenvalue was computed (large algebras). */
    readonly byForm: boolean;
  };
}

/** Side of a Choi-type matrix above which a generator given by jumps alone is not checked numerically. */
const MAX_CHOI_SIDE = 256;

export function markovChecks(g: Generator): MarkovChecks {
  const bound = generatorNormBound(g);
  const one = identity(g.algebra.size);
  const unital = relative(frobeniusNorm(applyGenerator(g, one)), bound * frobeniusNorm(one));
  const random = seededRandom('a Hermitian observable');
  const a = fromCoordinates(
    g.algebra,
    Float64Array.from({ length: g.algebra.dimension }, () => random.normal()),
  );
  const hermitian = relative(hermiticityResidual(applyGenerator(g, a)), bound * frobeniusNorm(a));
  return {
    hermitian: { holds: hermitian <= INPUT_TOLERANCE, residual: hermitian },
    unital: { holds: unital <= INPUT_TOLERANCE, residual: unital },
    completelyPositive: completePositivity(g),
  };
}

/** True when all three checks hold. */
export function isMarkov(checks: MarkovChecks): boolean {
  return checks.hermitian.holds && checks.unital.holds && checks.completelyPositive.holds;
}

function relative(residual: number, scale: number): number {
  return scale > 0 ? residual / scale : 0;
}

function completePositivity(g: Generator): MarkovChecks['completelyPositive'] {
  const { algebra } = g;
  const side = Math.max(...algebra.blocks) ** 2;
  if (!g.superoperator && (algebra.dimension > MAX_DENSE_DIMENSION || side > MAX_CHOI_SIDE)) {
    return { holds: true, smallestEigenvalue: 0, byForm: true };
  }
  const form = unitForm(g);
  let smallest = Infinity;
  let largest = 0;
  algebra.blocks.forEach((_, a) =>
    algebra.blocks.forEach((_, b) => {
      for (const value of choiEigenvalues(form, g, a, b)) {
        smallest = Math.min(smallest, value);
        largest = Math.max(largest, Math.abs(value));
      }
    }),
  );
  // On one point there is nothing to check: L = 0.
  if (smallest === Infinity) return { holds: true, smallestEigenvalue: 0, byForm: false };
  return { holds: smallest >= -POSITIVITY_TOLERANCE * largest, smallestEigenvalue: smallest, byForm: false };
}

/** Eigenvalues of C_{(kl),(k'l')} = [L(e_kk')]_{ll'}, k, k' in block a and l, l' in block b, without the identity when a = b. */
function choiEigenvalues(form: UnitForm, g: Generator, a: number, b: number): Float64Array {
  const { blocks, offsets } = g.algebra;
  const n = blocks[a];
  const m = blocks[b];
  if (n * m === 1)
    return Float64Array.from(a === b ? [] : [choiEntry(form, offsets[a], offsets[b], offsets[a], offsets[b])[0]]);
  const c = fromEntries(n * m, n * m, (r, s) =>
    choiEntry(
      form,
      offsets[a] + Math.floor(r / m),
      offsets[b] + (r % m),
      offsets[a] + Math.floor(s / m),
      offsets[b] + (s % m),
    ),
  );
  return a === b ? hermitianEigenvalues(compress(c, n)) : hermitianEigenvalues(c);
}

/** [L(e_kk')]_{ll'}. */
export function choiEntry(form: UnitForm, k: number, l: number, k2: number, l2: number): [number, number] {
  const { size: n, count, index } = form.units;
  const at = index[l * n + l2] * count + index[k * n + k2];
  return [form.matrix.re[at], form.matrix.im[at]];
}

/**
 * The compression of C to the complement of v = Σ e_kk/√n, of side n²−1: with the Householder reflection that sends v to the last
 * coordinate vector, so that no spurious zero eigenvalue is left.
 */
function compress(c: ComplexMatrix, n: number): ComplexMatrix {
  const d = c.rows;
  const w = Float64Array.from({ length: d }, (_, r) => (Math.floor(r / n) === r % n ? 1 / Math.sqrt(n) : 0));
  w[d - 1] += 1;
  const factor = 2 / w.reduce((sum, x) => sum + x * x, 0);
  // (1 − f ww*) C (1 − f ww*) = C − f w(w*C) − f (Cw)w* + f² (w*Cw) ww*, w real.
  const re = new Float64Array(d);
  const im = new Float64Array(d);
  let middle = 0;
  for (let r = 0; r < d; r++) {
    for (let s = 0; s < d; s++) {
      re[r] += c.re[r * d + s] * w[s];
      im[r] += c.im[r * d + s] * w[s];
    }
    middle += w[r] * re[r];
  }
  return fromEntries(d - 1, d - 1, (r, s) => [
    c.re[r * d + s] - factor * (w[r] * re[s] + re[r] * w[s]) + factor * factor * middle * w[r] * w[s],
    c.im[r * d + s] - factor * (im[r] * w[s] - w[r] * im[s]),
  ]);
}
