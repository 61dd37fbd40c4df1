/** V_a = √γ S_a, the spin operators: L = −γ Σ_a [S_a, [S_a, ·]] on 2s+1 levels. */
export default ({ twice, rate }, kit) =>
  kit.lindbladModel({
    title: `Isotropic noise on a spin ${twice % 2 === 0 ? twice / 2 : `${twice}/2`}`,
    jumps: [kit.spinX, kit.spinY, kit.spinZ].map((spin, a) => ({
      label: `S${'xyz'[a]}`,
      rate: 2 * rate,
      matrix: spin(twice / 2),
    })),
  });

export const claims = ({ twice, rate }) => [
  { constant: 'gap', relation: 'equals', value: 2 * rate, source: 'NOTES.md: tensors of rank one' },
  {
    constant: 'cge',
    relation: 'at-least',
    value: rate / 2,
    source: 'NOTES.md: explicit lift from the commutation relations',
  },
  ...(twice === 1
    ? [{ constant: 'cge', relation: 'equals', value: (3 / 2) * rate, source: 'twice the depolarising qubit' }]
    : []),
];
