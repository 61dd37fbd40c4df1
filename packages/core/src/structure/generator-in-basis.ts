import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, multiply, multiplyAdjointFirst, zeros } from '../linalg/complex-matrix.js';
import { type MatrixUnits, matrixUnits } from '../metric/matrix-units.js';

/** L in matrix units e_kk' of a basis of the algebra. */
export interface UnitForm {
  readonly units: MatrixUnits;
  /** D×D, entry (p,q) the coefficient of unit p in L(unit q): [L(e_kk')]_{ll'} at p = index(l,l'), q = index(k,k'). */
  readonly matrix: ComplexMatrix;
}

/** L in the matrix units u_k u_k'* of the columns of a block-diagonal unitary; null stands for the identity. */
export function generatorInBasis(g: Generator, vectors: ComplexMatrix | null): UnitForm {
  const units = matrixUnits(g.algebra);
  const { count, row, col, adjoint } = units;
  const matrix = zeros(count);
  for (let q = 0; q < count; q++) {
    if (row[q] > col[q]) continue;
    const image = transformed(g, vectors, row[q], col[q]);
    for (let p = 0; p < count; p++) {
      const at = row[p] * units.size + col[p];
      matrix.re[p * count + q] = image.re[at];
      matrix.im[p * count + q] = image.im[at];
      // L(A*) = L(A)*.
      if (row[q] === col[q]) continue;
      const to = adjoint[p] * count + adjoint[q];
      matrix.re[to] = image.re[at];
      matrix.im[to] = -image.im[at];
    }
  }
  return { units, matrix };
}

/** U*L(u_k u_k'*)U. */
function transformed(g: Generator, u: ComplexMatrix | null, k: number, k2: number): ComplexMatrix {
  const n = g.algebra.size;
  const unit = zeros(n);
  if (!u) {
    unit.re[k * n + k2] = 1;
    return applyGenerator(g, unit);
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const ar = u.re[i * n + k];
      const ai = u.im[i * n + k];
      const br = u.re[j * n + k2];
      const bi = -u.im[j * n + k2];
      unit.re[i * n + j] = ar * br - ai * bi;
      unit.im[i * n + j] = ar * bi + ai * br;
    }
  }
  return multiplyAdjointFirst(u, multiply(applyGenerator(g, unit), u));
}

/** The columns of the state's eigenbasis, or null when they are the standard ones. */
export function basisOf(state: {
  readonly vectors: ComplexMatrix;
  readonly values: Float64Array;
}): ComplexMatrix | null {
  const { vectors } = state;
  const standard = vectors.re.every((x, k) => x === (Math.floor(k / vectors.cols) === k % vectors.cols ? 1 : 0));
  return standard ? null : vectors;
}

/** The same for one generator and state, kept while the state lives. */
export function generatorInStateBasis(
  g: Generator,
  state: { readonly vectors: ComplexMatrix; readonly values: Float64Array },
): UnitForm {
  const known = forms.get(state);
  if (known?.g === g) return known.form;
  const form = generatorInBasis(g, basisOf(state));
  forms.set(state, { g, form });
  return form;
}

const forms = new WeakMap<object, { readonly g: Generator; readonly form: UnitForm }>();
