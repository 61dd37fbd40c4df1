import { type ComplexMatrix, addScaledInto, zeros } from '../linalg/complex-matrix.js';
import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { type Deflation, deflateSymmetric, deflation, inflate } from './deflate.js';
import { chainPencil } from './chain-pencil.js';
import { curvatureGradient } from './curvature-gradient.js';
import { curvatureForms } from './curvature-forms.js';
import { hermitianFormConverter } from './hermitian-forms.js';
import type { MetricModel } from './metric-model.js';
import { type MeanName, operatorMean } from './operator-mean.js';
import { rotateBackInto, rotateInto } from './rotate.js';
import type { StateFrame } from './state-frame.js';
import { smallestPencilWork, symmetricPencilSmallestInto } from '../linalg/symmetric-pencil.js';

/** Smallest eigenvalue of the gradient-estimate pencil at a state, with its eigenvector. */
export interface CurvatureAt {
  /** κ(ρ), a rate; +∞ when the algebra has no direction outside the fixed points, NaN when doubles cannot resolve the metric. */
  readonly kappa: number;
  /** The minimising observable A in the original basis, ‖A‖²_ρ = 1 at the scale of λ given. */
  readonly observable: ComplexMatrix;
}

export interface CurvaturePencil {
  readonly model: MetricModel;
  readonly mean: MeanName;
  /** κ(ρ) at ρ = U diag(λ) U*, λ > 0 on any scale. */
  at(frame: StateFrame): CurvatureAt;
  /** κ(ρ), and its gradient in ρ written to `out` in the frame of ρ (N×N Hermitian G with dκ = Re Tr G*dρ). */
  withGradient(frame: StateFrame, out: ComplexMatrix): number;
}

/**
 * κ(ρ) = inf_A q_ρ(A)/‖A‖²_ρ over observables outside the fixed points (§5 of the method; Carlen & Maas 2017, §10),
 * as the smallest eigenvalue of a real symmetric pencil of size dim M − dim F, twice that for means that are not
 * symmetric, where observables are not self-adjoint. Workspace is kept between calls, and one pencil with the model.
 */
export function curvaturePencil(model: MetricModel, mean: MeanName): CurvaturePencil {
  const known = pencils.get(model) ?? new Map<MeanName, CurvaturePencil>();
  pencils.set(model, known);
  const pencil = known.get(mean) ?? (model.commutative ? chainPencil(model, mean) : densePencil(model, mean));
  known.set(mean, pencil);
  return pencil;
}

const pencils = new WeakMap<MetricModel, Map<MeanName, CurvaturePencil>>();

/** The pencil on any algebra, commutative ones included: the plain path that `chainPencil` is tested against. */
export function densePencil(model: MetricModel, mean: MeanName): CurvaturePencil {
  const operator = operatorMean(mean);
  const forms = curvatureForms(model, operator, operator.symmetric);
  const converter = hermitianFormConverter(model.algebra, forms.units);
  const d = model.algebra.dimension;
  const n = operator.symmetric ? d : 2 * d;
  const m = n - (model.fixed.length * n) / d;
  const metric = new Float64Array(n * n);
  const curvature = new Float64Array(n * n);
  const g = new Float64Array(m * m);
  const q = new Float64Array(m * m);
  const work = new Float64Array(n);
  const vector = new Float64Array(m);
  const pencil = smallestPencilWork(m);
  const scratch = new Float64Array(2 * model.algebra.size ** 2);

  const full = new Float64Array(n);
  const kernelInFrame = kernelDeflation(model, n);
  const inFrame = zeros(model.algebra.size);
  const gradient = curvatureGradient(model, operator, forms);

  function at(frame: StateFrame): CurvatureAt {
    const kappa = solve(frame);
    return { kappa, observable: turnedBack(inFrame, frame.u) };
  }

  function withGradient(frame: StateFrame, out: ComplexMatrix): number {
    const kappa = solve(frame);
    gradient.at(frame.lambda, inFrame, kappa, out);
    return kappa;
  }

  /** κ(ρ), leaving the observable in the frame of ρ in `inFrame`. */
  function solve({ lambda, u }: StateFrame): number {
    if (m === 0) return Infinity;
    forms.evaluate(lambda, u);
    const convert = operator.symmetric ? converter.realPart : converter.doubled;
    convert(forms.metricRe, forms.metricIm, metric);
    convert(forms.curvatureRe, forms.curvatureIm, curvature);
    const kept = kernelInFrame(u);
    deflateSymmetric(kept, metric, g, work);
    deflateSymmetric(kept, curvature, q, work);
    const kappa = symmetricPencilSmallestInto(q, g, m, vector, pencil);
    const x = inflate(kept, vector, full);
    fromCoordinates(model.algebra, x.subarray(0, d), inFrame);
    if (!operator.symmetric) addScaledInto(inFrame, fromCoordinates(model.algebra, x.subarray(d)), 0, 1);
    return kappa;
  }

  function turnedBack(a: ComplexMatrix, u: ComplexMatrix | null): ComplexMatrix {
    const back = zeros(model.algebra.size);
    rotateBackInto(back, a, u, model.algebra.size, scratch);
    return back;
  }

  return { model, mean, at, withGradient };
}

/**
 * The fixed points in the frame of a state as a deflation of the real coordinates, of which there are n: D, or 2D where
 * observables are not self-adjoint. Multiples of the identity look the same in every frame.
 */
function kernelDeflation({ algebra, fixed }: MetricModel, n: number): (u: ComplexMatrix | null) => Deflation {
  const { size, dimension: d } = algebra;
  const copies = n / d;
  const vectors = new Float64Array(copies * fixed.length * n);
  const turned = zeros(size);
  const x = new Float64Array(d);
  const scratch = new Float64Array(2 * size * size);
  let last: Deflation | null = null;
  return (u) => {
    if (last && fixed.length === 1) return last;
    // Not in the frame of whichever state came first: its rounding would make later values depend on it.
    const frame = fixed.length === 1 ? null : u;
    vectors.fill(0);
    fixed.forEach((f, k) => {
      rotateInto(turned, f, frame, size, scratch);
      toCoordinates(algebra, turned, x);
      for (let c = 0; c < copies; c++) vectors.set(x, (c * fixed.length + k) * n + c * d);
    });
    last = deflation(vectors, copies * fixed.length, n);
    return last;
  };
}
