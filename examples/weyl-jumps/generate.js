/** L(A) = Σ_W (rate of W)/2 (W*AW + WAW* − 2A) over W = shift, clock: X e_j = e_{j+1}, Z e_j = e^{2πij/n} e_j. */
export default ({ n, shift, clock }, kit) =>
  kit.lindbladModel({
    title: `Random shifts and phases on ${n} levels`,
    jumps: [
      { label: 'X', rate: shift / 2, matrix: kit.weyl(n, 1, 0) },
      { label: 'X*', rate: shift / 2, matrix: kit.weyl(n, -1, 0) },
      { label: 'Z', rate: clock / 2, matrix: kit.weyl(n, 0, 1) },
      { label: 'Z*', rate: clock / 2, matrix: kit.weyl(n, 0, -1) },
    ],
  });

export const claims = ({ n, shift, clock }, kit) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: Math.min(shift, clock) * (1 - kit.rootOfUnity(1, n).re),
    source: 'NOTES.md: Weyl operators are eigenvectors',
  },
  {
    constant: 'cge',
    relation: 'at-least',
    value: 0,
    source: 'NOTES.md: L commutes with conjugation by Weyl operators',
  },
];
