import { model, qubit } from './refusal.js';

/** A chain that circulates: its invariant state is uniform, and detailed balance fails. */
export const CIRCULATING = model({
  title: 'Circulating chain',
  generator: {
    form: 'rates',
    rates: [
      [0, 2, 1],
      [1, 0, 2],
      [2, 1, 0],
    ],
  },
});

/** Amplitude damping towards a pure state: no faithful invariant state. */
export const DECAY = qubit([{ label: 'decay', rate: 1, matrix: [[0, 1], [0, 0]] }]); // prettier-ignore

/** KMS-symmetric for diag(0.7, 0.3), not GNS-symmetric. */
export function kmsQubit(): object {
  const r = [0.7 ** 0.25, 0.3 ** 0.25] as const;
  const h = [[0.3, 1], [1, -0.5]] as const; // prettier-ignore
  const at = (a: readonly (readonly number[])[], i: number, j: number): number => a[i]?.[j] ?? 0;
  const k = square((i, j) => (at(h, i, j) * (r[j] ?? 1)) / (r[i] ?? 1));
  const p = square((i, j) => at(k, 0, i) * at(k, 0, j) + at(k, 1, i) * at(k, 1, j));
  // G = σ^{-1/4} M σ^{1/4} with G + G* = K*K makes K*AK − G*A − AG unital and KMS-symmetric.
  const g = square((i, j) => at(p, i, j) / (1 + ((r[i] ?? 1) / (r[j] ?? 1)) ** 2));
  const matrix = Array.from({ length: 4 }, (_, row) =>
    Array.from({ length: 4 }, (_column, column) => {
      const [i, j, a, b] = [row >> 1, row & 1, column >> 1, column & 1];
      return at(k, a, i) * at(k, b, j) - (j === b ? at(g, a, i) : 0) - (i === a ? at(g, b, j) : 0);
    }),
  );
  return model({
    algebra: [2],
    generator: { form: 'superoperator', picture: 'heisenberg', stacking: 'rows', matrix },
  });
}

/** Three Hermitian jumps without any symmetry on n levels: its searches take long. */
export function heavyModel(n: number): object {
  const levels = Array.from({ length: n }, (_, k) => k + 1);
  const jumps = [1, 2, 3].map((m) => ({ matrix: levels.map((i) => levels.map((j) => Math.cos(i * j * m))) }));
  return model({ algebra: [n], generator: { form: 'lindblad', jumps } });
}

/** Bit and phase flips on every one of n qubits. */
export function flips(n: number): object {
  const jumps = Array.from({ length: n }, (_, k) => k).flatMap((k) =>
    ['X', 'Z'].map((letter) => ({ matrix: { pauli: 'I'.repeat(k) + letter + 'I'.repeat(n - k - 1) } })),
  );
  return model({ algebra: [2 ** n], generator: { form: 'lindblad', jumps } });
}

function square(entry: (i: number, j: number) => number): number[][] {
  return [0, 1].map((i) => [0, 1].map((j) => entry(i, j)));
}
