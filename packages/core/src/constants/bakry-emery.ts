import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, frobeniusNorm, hermitianPart, zeros } from '../linalg/complex-matrix.js';
import type { Random } from '../random.js';
import { ALTERNATION_TOLERANCE } from '../tolerances.js';
import { type CarreDuChamp, carreDuChamp } from './carre-du-champ.js';
import { isUnitarilyCovariant } from './covariance.js';
import { type DegeneratePencil, degeneratePencil } from './degenerate-pencil.js';

/** Largest K with Γ₂ ≥ KΓ as completely positive forms: an eigenvalue problem of side D·n_b in each block. */
export interface CompleteBakryEmery extends DegeneratePencil {
  /** Block of the algebra in which the minimum is attained. */
  readonly block: number;
}

/** `cbe` from L alone (Bakry & Émery 1985; complete form: Li, Junge & LaRacuente 2022). Cost (D·n_b)³. */
export function completeBakryEmery(forms: CarreDuChamp): CompleteBakryEmery {
  let best: CompleteBakryEmery | null = null;
  for (const { block, gamma, gamma2 } of forms.blocks) {
    const found = { ...degeneratePencil(hermitianPart(gamma2), hermitianPart(gamma)), block };
    if (!best || found.value < best.value) best = found;
  }
  return best as CompleteBakryEmery;
}

/** Upper end of `be`: a unit vector ψ and an observable A with <ψ|Γ₂(A,A)ψ> = value·<ψ|Γ(A,A)ψ>. */
export interface BakryEmeryResult {
  readonly value: number;
  readonly margin: number;
  /** N×1 unit vector. */
  readonly psi: ComplexMatrix;
  /** N×N observable, not self-adjoint in general. */
  readonly observable: ComplexMatrix;
  /** True when the value is the constant itself: every ψ was covered (one-dimensional blocks or unitary covariance). */
  readonly complete: boolean;
  readonly decided: boolean;
}

/** `be`: exact where blocks are one-dimensional or L commutes with the unitaries; else alternating minimisation over (ψ, A). */
export function bakryEmery(
  g: Generator,
  forms: CarreDuChamp = carreDuChamp(g),
  options: { readonly random: Random; readonly starts?: number; readonly stop?: () => boolean },
): BakryEmeryResult {
  const covariant = isUnitarilyCovariant(g);
  let best: BakryEmeryResult | null = null;
  forms.blocks.forEach(({ block, gamma, gamma2 }) => {
    const size = g.algebra.blocks[block];
    const complete = size === 1 || covariant;
    const vectors = complete ? [unit(size, 0)] : startVectors(size, options.starts ?? 12, options.random);
    for (const start of vectors) {
      if (best && options.stop?.()) return;
      const found = complete ? solveObservable(gamma, gamma2, start) : alternate(gamma, gamma2, start, options.stop);
      if (best && found.pencil.value >= best.value) continue;
      best = {
        value: found.pencil.value,
        margin: found.pencil.margin,
        psi: embedVector(found.psi, g.algebra.offsets[block], g.algebra.size),
        observable: observableOf(found.pencil.vector, forms),
        complete,
        decided: found.pencil.decided,
      };
    }
  });
  const result = best as unknown as BakryEmeryResult;
  const allComplete = covariant || g.algebra.blocks.every((n) => n === 1);
  return { ...result, complete: allComplete };
}

interface Step {
  readonly pencil: DegeneratePencil;
  readonly psi: ComplexMatrix;
}

/** Best observable at fixed ψ, then best ψ at fixed observable, until the value settles. The value never increases. */
function alternate(gamma: ComplexMatrix, gamma2: ComplexMatrix, start: ComplexMatrix, stop?: () => boolean): Step {
  let step = solveObservable(gamma, gamma2, start);
  const rate = frobeniusNorm(gamma2) / frobeniusNorm(gamma);
  for (let round = 0; round < 400; round++) {
    if (!Number.isFinite(step.pencil.value) || stop?.()) return step;
    const a = step.pencil.vector;
    const forPsi = degeneratePencil(contractObservable(gamma2, a), contractObservable(gamma, a), frobeniusNorm(gamma2));
    if (!Number.isFinite(forPsi.value)) return step;
    const next = solveObservable(gamma, gamma2, normalised(forPsi.vector));
    const gain = step.pencil.value - next.pencil.value;
    if (gain <= 0) return step;
    step = next;
    if (gain <= ALTERNATION_TOLERANCE * (rate + Math.abs(next.pencil.value))) return step;
  }
  return step;
}

function solveObservable(gamma: ComplexMatrix, gamma2: ComplexMatrix, psi: ComplexMatrix): Step {
  const scale = frobeniusNorm(gamma2);
  return { pencil: degeneratePencil(contractVector(gamma2, psi), contractVector(gamma, psi), scale), psi };
}

/** <ψ|F(e_p,e_q)ψ>: D×D from the D·n form. */
function contractVector(form: ComplexMatrix, psi: ComplexMatrix): ComplexMatrix {
  const n = psi.rows;
  const d = form.rows / n;
  const out = zeros(d);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) accumulate(form, psi, out, p, q, (k, l) => (p * n + k) * form.rows + q * n + l);
  }
  return hermitianPart(out);
}

/** Σ conj(a_p) F(e_p,e_q)_{kl} a_q: n×n from the D·n form. */
function contractObservable(form: ComplexMatrix, a: ComplexMatrix): ComplexMatrix {
  const d = a.rows;
  const n = form.rows / d;
  const out = zeros(n);
  for (let k = 0; k < n; k++) {
    for (let l = 0; l < n; l++) accumulate(form, a, out, k, l, (p, q) => (p * n + k) * form.rows + q * n + l);
  }
  return hermitianPart(out);
}

/** out[i,j] = Σ_{s,t} conj(v_s) form[at(s,t)] v_t. */
function accumulate(
  form: ComplexMatrix,
  v: ComplexMatrix,
  out: ComplexMatrix,
  i: number,
  j: number,
  at: (s: number, t: number) => number,
): void {
  let re = 0;
  let im = 0;
  for (let s = 0; s < v.rows; s++) {
    for (let t = 0; t < v.rows; t++) {
      const index = at(s, t);
      const wr = v.re[s] * v.re[t] + v.im[s] * v.im[t];
      const wi = v.re[s] * v.im[t] - v.im[s] * v.re[t];
      re += form.re[index] * wr - form.im[index] * wi;
      im += form.re[index] * wi + form.im[index] * wr;
    }
  }
  out.re[i * out.cols + j] = re;
  out.im[i * out.cols + j] = im;
}

function startVectors(n: number, count: number, random: Random): ComplexMatrix[] {
  const out = Array.from({ length: n }, (_, k) => unit(n, k));
  for (let k = 0; k < count; k++) {
    const v = zeros(n, 1);
    for (let i = 0; i < n; i++) {
      v.re[i] = random.normal();
      v.im[i] = random.normal();
    }
    out.push(normalised(v));
  }
  return out;
}

function unit(n: number, k: number): ComplexMatrix {
  const v = zeros(n, 1);
  v.re[k] = 1;
  return v;
}

function normalised(v: ComplexMatrix): ComplexMatrix {
  const norm = frobeniusNorm(v);
  return { rows: v.rows, cols: 1, re: v.re.map((x) => x / norm), im: v.im.map((x) => x / norm) };
}

function embedVector(psi: ComplexMatrix, offset: number, size: number): ComplexMatrix {
  const out = zeros(size, 1);
  out.re.set(psi.re, offset);
  out.im.set(psi.im, offset);
  return out;
}

function observableOf(vector: ComplexMatrix, { units }: CarreDuChamp): ComplexMatrix {
  const out = zeros(units.size);
  for (let p = 0; p < units.count; p++) {
    out.re[units.row[p] * units.size + units.col[p]] = vector.re[p];
    out.im[units.row[p] * units.size + units.col[p]] = vector.im[p];
  }
  return out;
}
