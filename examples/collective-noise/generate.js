/** V_a = √γ S_a with the total spin S_a = ½ Σ_i σ_a(i): L = −γ Σ_a [S_a, [S_a, ·]]. */
export default ({ qubits, rate }, kit) =>
  kit.lindbladModel({
    title: `Collective isotropic noise on ${qubits} qubits`,
    algebra: [2 ** qubits],
    jumps: ['X', 'Y', 'Z'].map((letter) => ({
      label: `S${letter}`,
      rate: 2 * rate,
      matrix: totalSpin(letter, qubits, kit),
    })),
  });

export const claims = ({ rate }) => [
  { constant: 'gap', relation: 'equals', value: 2 * rate, source: 'NOTES.md: tensors of rank one' },
  {
    constant: 'cge',
    relation: 'at-least',
    value: rate / 2,
    source: 'NOTES.md: explicit lift from the commutation relations',
  },
];

function totalSpin(letter, qubits, kit) {
  const string = (k) => 'I'.repeat(k) + letter + 'I'.repeat(qubits - 1 - k);
  return kit.matrix({ pauli: Object.fromEntries(Array.from({ length: qubits }, (_, k) => [string(k), 1 / 2])) });
}
