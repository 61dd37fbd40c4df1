import { generatorMatrix, isCommutative, symmetryOf, type ReferenceState, type Structure } from '@thalweg/core';

/** Why a Markov generator with a faithful invariant state is not GNS-symmetric, one sentence each. */
export function symmetryNotes(structure: Structure): string[] {
  const { algebra, symmetry, state } = structure;
  if (!state?.faithful) return [];
  if (symmetry.kind === 'KMS') {
    return ['L is KMS-symmetric but does not commute with the modular group of σ, and GNS symmetry asks for both.'];
  }
  if (symmetry.kind !== 'none') return [];
  if (isCommutative(algebra) && algebra.dimension <= LARGEST_CHAIN) return [detailedBalanceNote(structure, state)];
  return hamiltonianNote(structure, state);
}

/** Larger chains are not written out as a matrix. */
const LARGEST_CHAIN = 400;

/** The pair of points whose flows differ most in the invariant state. */
function detailedBalanceNote({ generator, algebra }: Structure, { sigma }: ReferenceState): string {
  const n = algebra.dimension;
  const rates = generatorMatrix(generator);
  const flow = (x: number, y: number): number => (sigma.re[x * n + x] ?? 0) * (rates[x * n + y] ?? 0);
  let worst: readonly [number, number] = [0, 0];
  for (let x = 0; x < n; x++) {
    for (let y = 0; y < n; y++) if (flow(x, y) - flow(y, x) > flow(...worst) - flow(worst[1], worst[0])) worst = [x, y];
  }
  const [x, y] = worst;
  const text = (value: number): string => value.toPrecision(4);
  return `The chain is not reversible: it flows from point ${x} to point ${y} at σ_${x} L_${x}${y} = ${text(flow(x, y))}, and back at ${text(flow(y, x))} (points count from 0).`;
}

/** i[H,·] is antisymmetric in every one of the products: say so where it alone breaks the symmetry. */
function hamiltonianNote({ generator }: Structure, state: ReferenceState): string[] {
  if (!generator.hamiltonian) return [];
  const { kind } = symmetryOf({ ...generator, hamiltonian: null }, state);
  return kind === 'none'
    ? []
    : ['The Hamiltonian breaks the symmetry: without it, L would be symmetric for the same state.'];
}
