import type { LiftCertificate, MatrixEntry } from '../checker/lift-certificate.js';
import type { FoundLift } from '../lift/index.js';
import { inStateBasis } from '../lift/state-basis.js';
import { type ComplexMatrix, diagonal } from '../linalg/complex-matrix.js';
import { type SparseMatrix, sparseFromDense } from '../linalg/sparse-matrix.js';
import type { CanonicalForm } from '../structure/canonical-form.js';

/** A lift as a certificate in floating point: W_j = V_j, rate 2e^{−ω/2}, ratio e^{ω}. */
export function draftCertificate(canonical: Written, lift: FoundLift): LiftCertificate {
  const jumps = canonical.jumps.map(({ label, sparse, frequency, partner }) => ({
    label,
    entries: sparseEntries(sparse),
    rate: 2 * Math.exp(-frequency / 2),
    ratio: Math.exp(frequency),
    partner,
  }));
  const root = (m: number): number => (m < 0 ? 1 : Math.sqrt(jumps[m].rate));
  return {
    constant: 'cge',
    grade: 'certified',
    bound: lift.curvature,
    blocks: canonical.algebra.blocks,
    state: denseEntries(canonical.state.sigma),
    jumps,
    lift: lift.coefficients
      .filter(({ re, im }) => re !== 0 || im !== 0)
      .map(({ term, re, im }) => {
        const factor = root(term.left) * root(term.right);
        return { ...term, re: factor * re, im: factor * im };
      }),
  };
}

/**
 * The same in the eigenbasis of σ, which becomes the frame: there a state that is not diagonal in the basis of the model has rational
 * neighbours. Null where that changes nothing.
 */
export function draftInFrame(canonical: CanonicalForm, lift: FoundLift): LiftCertificate | null {
  const { algebra, state } = canonical;
  const turned = inStateBasis(canonical);
  if (turned.jumps === canonical.jumps) return null;
  const jumps = turned.jumps.map((jump) => ({ ...jump, sparse: sparseFromDense(jump.matrix) }));
  const diagonalState = { sigma: diagonal(Array.from(state.values)) };
  return {
    ...draftCertificate({ algebra, jumps, state: diagonalState }, lift),
    frame: denseEntries(state.vectors),
  };
}

/** What is written down of a canonical form. */
interface Written extends Pick<CanonicalForm, 'algebra' | 'jumps'> {
  readonly state: Pick<CanonicalForm['state'], 'sigma'>;
}

function sparseEntries(a: SparseMatrix): MatrixEntry[] {
  const out: MatrixEntry[] = [];
  for (let i = 0; i < a.rows; i++) {
    for (let s = a.rowStart[i]; s < a.rowStart[i + 1]; s++) out.push([i, a.colIndex[s], a.re[s], a.im[s]]);
  }
  return out;
}

function denseEntries(a: ComplexMatrix): MatrixEntry[] {
  const out: MatrixEntry[] = [];
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.cols; j++) {
      const [re, im] = [a.re[i * a.cols + j], a.im[i * a.cols + j]];
      if (re !== 0 || im !== 0) out.push([i, j, re, im]);
    }
  }
  return out;
}
