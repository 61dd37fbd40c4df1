import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { type ComplexIntervalMatrix, complexPointMatrix } from '../checker/arithmetic/interval-matrix.js';
import { type Interval, add, div, interval, mul, point } from '../checker/arithmetic/interval.js';
import { addUp, mulUp, subDown } from '../checker/arithmetic/rounding.js';
import { widenCorners } from '../checker/arithmetic/widen-corners.js';
import { type ComplexMatrix, multiply, multiplyAdjointFirst } from '../linalg/complex-matrix.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import { basisOf } from '../structure/generator-in-basis.js';
import type { ReferenceState } from '../structure/reference-state.js';
import type { Structure } from '../structure/structure.js';
import { BOX_RADIUS, ENCLOSURE_DIMENSION } from './limits.js';

/** All jumps of one corner within `radius` of V_j in every entry, with all frequencies of an interval. */
export interface BoxJump {
  /** V_j, N×N, zero outside the corner. */
  readonly matrix: ComplexMatrix;
  /** BOX_RADIUS·‖V_j‖_F. */
  readonly radius: number;
  readonly frequency: Interval;
}

/**
 * What an enclosed end is about: every generator with the symmetry and the fixed points found, in the canonical form
 * L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}), whose jumps, frequencies and eigenvalues of σ lie in this box around the doubles,
 * up to a rotation of the algebra, which changes no constant. The box is made only where L is its own canonical form to
 * BOX_RADIUS·‖L‖: the model whose rounding the doubles are is then inside, while doubles themselves are hardly ever symmetric.
 */
export interface ModelBox {
  readonly algebra: BlockAlgebra;
  readonly jumps: readonly BoxJump[];
  /** Eigenvalues of σ, of sum one; weights[k] belongs to column k of `frame`. */
  readonly weights: readonly Interval[];
  /** Eigenvectors of σ, block-diagonal, null for the standard basis; made unitary before use. */
  readonly frame: ComplexMatrix | null;
}

/** The box of a GNS-symmetric model; null for other models, large ones, and those whose canonical form is not close enough. */
export function modelBox(structure: Structure): ModelBox | null {
  const known = boxes.get(structure);
  if (known !== undefined) return known;
  const box = boxOf(structure);
  boxes.set(structure, box);
  return box;
}

const boxes = new WeakMap<Structure, ModelBox | null>();

function boxOf(structure: Structure): ModelBox | null {
  const { canonical, algebra, symmetry } = structure;
  if (!canonical || !hasGradientMetric(structure) || algebra.dimension > ENCLOSURE_DIMENSION) return null;
  if (canonical.jumps.length === 0 || !(canonical.residual <= BOX_RADIUS)) return null;
  const { state } = canonical;
  // Jumps closed under adjoints without frequencies are symmetric for the trace, however σ was found.
  const tracial = symmetry.kind === 'tracial' && canonical.jumps.every(({ frequency }) => frequency === 0);
  const frame = tracial ? null : basisOf(state);
  const jumps = canonical.jumps.map(({ matrix, frequency, partner, norm }, j): BoxJump => {
    const spread = tracial || partner === j ? 0 : BOX_RADIUS * (1 + Math.abs(frequency));
    return {
      matrix,
      radius: BOX_RADIUS * norm,
      frequency: { lo: subDown(frequency, spread), hi: addUp(frequency, spread) },
    };
  });
  if (!tracial && !jumps.every((jump) => isModular(jump, state, frame))) return null;
  return {
    algebra,
    jumps,
    weights: tracial ? flat(algebra.size) : normalised(state.values),
    frame,
  };
}

/** σVσ⁻¹ = e^{−ω}V within the radius of the box. */
function isModular(
  { matrix, radius, frequency }: BoxJump,
  { values }: ReferenceState,
  u: ComplexMatrix | null,
): boolean {
  const v = u ? multiplyAdjointFirst(u, multiply(matrix, u)) : matrix;
  const n = values.length;
  const omega = (frequency.lo + frequency.hi) / 2;
  let defect = 0;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const k = a * n + b;
      const size = Math.hypot(v.re[k], v.im[k]);
      if (size > 0) defect = Math.hypot(defect, size * (Math.log(values[b] / values[a]) - omega));
    }
  }
  return defect <= radius * (1 + Math.abs(omega));
}

function flat(n: number): Interval[] {
  return new Array<Interval>(n).fill(div(point(1), point(n)));
}

/** Eigenvalues within BOX_RADIUS of the doubles, relative, divided by the sum of the doubles. */
function normalised(values: Float64Array): Interval[] {
  const sum = values.reduce((total, x) => add(total, point(x)), point(0));
  const near = interval(1 - BOX_RADIUS, 1 + BOX_RADIUS);
  return Array.from(values, (x) => mul(near, div(point(x), sum)));
}

/** Every member of a jump, in the basis of the document. */
export function jumpEnclosure(
  { matrix, radius }: Pick<BoxJump, 'matrix' | 'radius'>,
  { blocks }: BlockAlgebra,
): ComplexIntervalMatrix {
  return widenCorners(complexPointMatrix(matrix), matrix, blocks, radius);
}

/** Upper bound of BOX_RADIUS·‖V‖_F. */
export function radiusOf(v: ComplexMatrix): number {
  let sum = 0;
  for (let k = 0; k < v.re.length; k++) sum += v.re[k] ** 2 + v.im[k] ** 2;
  return mulUp(BOX_RADIUS, Math.sqrt(sum) * (1 + 2 ** -40));
}
