import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { frobeniusNorm, multiply, multiplyAdjointFirst } from '../linalg/complex-matrix.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { JUMP_DUST, STATE_OFF_DIAGONAL } from '../tolerances.js';

/**
 * The canonical form written in the eigenbasis of σ, where conserved charges show as zeros of the jumps, so that the form of a
 * lift falls into blocks. The coefficients of a lift are numbers on pairs of jumps: the same in either basis. A form with
 * σ already diagonal, or without frequencies (then the basis is arbitrary), is returned as it is.
 */
export function inStateBasis(canonical: CanonicalForm): Pick<CanonicalForm, 'algebra' | 'jumps'> {
  const { algebra, state, jumps } = canonical;
  if (jumps.every(({ frequency }) => frequency === 0) || isNearlyDiagonal(state.sigma)) return canonical;
  return {
    algebra,
    jumps: jumps.map((jump) => ({
      ...jump,
      matrix: withoutDust(multiplyAdjointFirst(state.vectors, multiply(jump.matrix, state.vectors))),
    })),
  };
}

function isNearlyDiagonal({ rows: n, re, im }: ComplexMatrix): boolean {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const size = Math.sqrt(re[i * n + i] * re[j * n + j]);
      if (i !== j && Math.hypot(re[i * n + j], im[i * n + j]) > STATE_OFF_DIAGONAL * size) return false;
    }
  }
  return true;
}

/** Entries that rotating has left instead of zeros, set to zero. */
function withoutDust(a: ComplexMatrix): ComplexMatrix {
  const dust = JUMP_DUST * frobeniusNorm(a);
  for (let p = 0; p < a.re.length; p++) {
    if (Math.hypot(a.re[p], a.im[p]) > dust) continue;
    a.re[p] = 0;
    a.im[p] = 0;
  }
  return a;
}
