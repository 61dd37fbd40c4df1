/** e^{β/2} D[a] + e^{−β/2} D[a*] on the first levels, D[R](A) = R*AR − ½{R*R, A}. */
export default ({ levels, beta }, kit) =>
  kit.lindbladModel({
    title: `Thermal oscillator on ${levels} levels, inverse temperature ${beta}`,
    state: kit.gibbsState(
      Array.from({ length: levels }, (_, k) => k),
      beta,
    ),
    jumps: [
      { label: 'a', rate: kit.exp(beta / 2), matrix: kit.annihilation(levels) },
      { label: 'a*', rate: kit.exp(-beta / 2), matrix: kit.creation(levels) },
    ],
  });

export const claims = ({ beta }, kit) => [
  {
    constant: 'gap',
    relation: 'tends-to',
    along: 'levels',
    value: kit.sinh(beta / 2),
    source: 'Carlen & Maas, J. Funct. Anal. 273 (2017): the oscillator without cutoff',
  },
];
