import type { MatrixUnits } from '../algebra/matrix-units.js';
import type { Generator } from '../generator/generator.js';
import { type UnitForm, unitForm } from '../generator/unit-form.js';
import {
  type ComplexMatrix,
  conjugate,
  multiply,
  multiplyAdjointFirst,
  transpose,
  zeros,
} from '../linalg/complex-matrix.js';

/** The eigenvectors of a state, block-diagonal unitary. */
interface Frame {
  readonly vectors: ComplexMatrix;
}

/** L in the matrix units u_k u_k'* of the eigenvectors of a state. Kept while the state lives. */
export function generatorInStateBasis(g: Generator, state: Frame): UnitForm {
  const u = basisOf(state);
  if (!u) return unitForm(g);
  const known = forms.get(state);
  if (known?.g === g) return known.form;
  const form = rotated(unitForm(g), u);
  forms.set(state, { g, form });
  return form;
}

/** The columns of the state's eigenbasis, or null when they are the standard ones. */
export function basisOf({ vectors }: Frame): ComplexMatrix | null {
  const standard = vectors.re.every((x, k) => x === (Math.floor(k / vectors.cols) === k % vectors.cols ? 1 : 0));
  return standard ? null : vectors;
}

const forms = new WeakMap<object, { readonly g: Generator; readonly form: UnitForm }>();

/** W*MW for W(A) = UAU*: the rows of M as functionals, then the columns as elements. */
function rotated({ units, matrix }: UnitForm, u: ComplexMatrix): UnitForm {
  const half = zeros(units.count);
  const left = transpose(u);
  const right = conjugate(u);
  for (let p = 0; p < units.count; p++) {
    const functional = elementAt(units, matrix, p * units.count, 1);
    write(units, half, p * units.count, 1, multiply(left, multiply(functional, right)));
  }
  const out = zeros(units.count);
  for (let q = 0; q < units.count; q++) {
    const element = elementAt(units, half, q, units.count);
    write(units, out, q, units.count, multiplyAdjointFirst(u, multiply(element, u)));
  }
  return { units, matrix: out };
}

/** The N×N matrix whose unit coefficients sit at start, start + step, … */
function elementAt(units: MatrixUnits, m: ComplexMatrix, start: number, step: number): ComplexMatrix {
  const out = zeros(units.size);
  for (let k = 0, at = start; k < units.count; k++, at += step) {
    const to = units.row[k] * units.size + units.col[k];
    out.re[to] = m.re[at];
    out.im[to] = m.im[at];
  }
  return out;
}

function write(units: MatrixUnits, m: ComplexMatrix, start: number, step: number, a: ComplexMatrix): void {
  for (let k = 0, at = start; k < units.count; k++, at += step) {
    const from = units.row[k] * units.size + units.col[k];
    m.re[at] = a.re[from];
    m.im[at] = a.im[from];
  }
}
