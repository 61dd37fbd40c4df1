import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import type { UnitForm } from '../generator/unit-form.js';
import {
  type ComplexMatrix,
  adjoint,
  frobeniusNorm,
  fromEntries,
  multiply,
  multiplyAdjointSecond,
  zeros,
} from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { sparseFromDense } from '../linalg/sparse-matrix.js';
import { JUMP_TOLERANCE, POSITIVITY_TOLERANCE } from '../tolerances.js';
import type { StoredJump } from './canonical-form.js';
import { basisOf, generatorInStateBasis } from './generator-in-basis.js';
import { modularFrequencies } from './modular-frequencies.js';
import { choiEntry } from './positivity.js';
import type { ReferenceState } from './reference-state.js';
import { selfAdjointJumps } from './self-adjoint-jumps.js';

/** A jump in the eigenbasis of σ. */
export interface RawJump {
  /** Eigenvalue c of the Kossakowski matrix, a rate: R = √c W. */
  readonly weight: number;
  /** W, N×N, ‖W‖_F = 1. */
  readonly direction: ComplexMatrix;
  readonly frequency: number;
  readonly selfAdjoint: boolean;
}

/**
 * Canonical jumps from L alone: in the eigenbasis of σ the matrix C_{(kl),(k'l')} = [L(e_kk')]_{ll'} of each corner is
 * block-diagonal over the frequencies of e_kl; each block is diagonalised, eigenvalue c and vector v giving R = √c Σ conj(v_p)e_p.
 * Of each pair ±ω the side ω < 0, whose rate is the larger, is diagonalised, and the other taken as its adjoint.
 */
export function extractJumps(g: Generator, state: ReferenceState): StoredJump[] {
  const form = generatorInStateBasis(g, state);
  const frequencies = modularFrequencies(state);
  const raw = cornerGroups(g.algebra, frequencies).flatMap((group) =>
    group.selfAdjoint
      ? selfAdjointJumps(form, group.pairs, g.algebra, group.block)
      : modularJumps(form, group.pairs, group.frequency),
  );
  const largest = raw.reduce((top, jump) => Math.max(top, Math.abs(jump.weight)), 0);
  const smallest = raw.reduce((low, jump) => Math.min(low, jump.weight), 0);
  if (smallest < -POSITIVITY_TOLERANCE * largest) {
    throw new ThalwegError(
      'not-completely-positive',
      `expected a completely positive semigroup, got the Kossakowski eigenvalue ${smallest.toPrecision(6)}`,
      { details: { eigenvalue: smallest } },
    );
  }
  return named(
    raw.filter((jump) => jump.weight > JUMP_TOLERANCE * largest),
    basisOf(state),
  );
}

interface CornerGroup {
  /** Matrix units (k,l) of one corner with one frequency. */
  readonly pairs: readonly (readonly [number, number])[];
  readonly frequency: number;
  /** True for frequency 0 inside a block, where the span is closed under adjoints. */
  readonly selfAdjoint: boolean;
  /** Block of the rows. */
  readonly block: number;
}

function cornerGroups(algebra: BlockAlgebra, frequencies: Float64Array): CornerGroup[] {
  const n = algebra.size;
  const groups = new Map<
    string,
    { pairs: [number, number][]; frequency: number; selfAdjoint: boolean; block: number }
  >();
  for (let k = 0; k < n; k++) {
    for (let l = 0; l < n; l++) {
      const frequency = frequencies[k * n + l];
      const a = algebra.blockOf[k];
      const b = algebra.blockOf[l];
      if (frequency > 0) continue;
      // Clustering has made what is near zero exactly zero.
      const zero = !(frequency < 0);
      if (zero && a > b) continue;
      const key = `${a} ${b} ${frequency}`;
      const group = groups.get(key) ?? { pairs: [], frequency, selfAdjoint: zero && a === b, block: a };
      group.pairs.push([k, l]);
      groups.set(key, group);
    }
  }
  return [...groups.values()].sort((x, y) => x.frequency - y.frequency);
}

function modularJumps(form: UnitForm, pairs: CornerGroup['pairs'], frequency: number): RawJump[] {
  const m = pairs.length;
  const n = form.units.size;
  const { values, vectors } = hermitianEigen(
    fromEntries(m, m, (r, s) => choiEntry(form, pairs[r][0], pairs[r][1], pairs[s][0], pairs[s][1])),
  );
  const jumps: RawJump[] = [];
  for (let j = m - 1; j >= 0; j--) {
    const direction = zeros(n);
    pairs.forEach(([k, l], p) => {
      direction.re[k * n + l] = vectors.re[p * m + j];
      direction.im[k * n + l] = -vectors.im[p * m + j];
    });
    jumps.push({ weight: values[j], direction, frequency, selfAdjoint: false });
  }
  return jumps;
}

/** V = √(c/2) e^{ω/4} W in the basis of the document, each followed by its adjoint. */
function named(raw: readonly RawJump[], u: ComplexMatrix | null): StoredJump[] {
  const jumps: StoredJump[] = [];
  raw.forEach(({ weight, direction, frequency, selfAdjoint }, at) => {
    const factor = Math.sqrt(weight / 2) * Math.exp(frequency / 4);
    const rotated = u ? multiplyAdjointSecond(multiply(u, direction), u) : direction;
    const v = { ...rotated, re: rotated.re.map((x) => factor * x), im: rotated.im.map((x) => factor * x) };
    const norm = frobeniusNorm(v);
    const label = `V${at + 1}`;
    const j = jumps.length;
    if (selfAdjoint) {
      jumps.push({ label, sparse: sparseFromDense(hermitian(v)), frequency: 0, partner: j, norm });
      return;
    }
    jumps.push({ label, sparse: sparseFromDense(v), frequency, partner: j + 1, norm });
    jumps.push({ label: `${label}*`, sparse: sparseFromDense(adjoint(v)), frequency: 0 - frequency, partner: j, norm });
  });
  return jumps;
}

/** Exactly self-adjoint, whatever the rotation rounded. */
function hermitian(v: ComplexMatrix): ComplexMatrix {
  const w = adjoint(v);
  return { ...v, re: v.re.map((x, k) => (x + w.re[k]) / 2), im: v.im.map((x, k) => (x + w.im[k]) / 2) };
}
