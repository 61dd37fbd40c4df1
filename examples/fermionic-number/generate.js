/** Jumps U_j that flip the sign of one Majorana operator and no other: Pauli strings 1…1 Y Z…Z and 1…1 X Z…Z. */
export default ({ modes, rate }, kit) =>
  kit.lindbladModel({
    title: `Number operator of ${modes} fermionic mode${modes === 1 ? '' : 's'}`,
    jumps: Array.from({ length: 2 * modes }, (_, j) => ({
      label: `c${j + 1}`,
      rate: rate / 2,
      matrix: kit.pauli(signFlip(modes, j)),
    })),
  });

function signFlip(modes, j) {
  const mode = Math.floor(j / 2);
  return 'I'.repeat(mode) + (j % 2 === 0 ? 'Y' : 'X') + 'Z'.repeat(modes - 1 - mode);
}

export const claims = ({ rate }) => {
  const source = 'Carlen & Maas, Commun. Math. Phys. 331 (2014); NOTES.md';
  return [
    { constant: 'gap', relation: 'equals', value: rate, source: 'NOTES.md: degree one' },
    ...['ge', 'cge', 'mlsi'].map((constant) => ({ constant, relation: 'equals', value: rate, source })),
  ];
};
