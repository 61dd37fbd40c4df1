/** Σ_i id ⊗ … L … ⊗ id on the sites of a register, L one of three semigroups of a qubit. */
export default ({ sites, noise, beta }, kit) => {
  const factors = Array.from({ length: sites }, () => qubit(noise, beta, kit));
  return kit.tensorModel(factors, {
    title: `${noise[0].toUpperCase()}${noise.slice(1)} noise on each of ${sites} qubits`,
  });
};

/** The values of one qubit: gap and complete gradient estimate. */
export const claims = ({ noise, beta }, kit) => {
  const thermal = 2 * kit.cosh(beta / 2);
  const { gap, complete } = {
    depolarising: { gap: 1, complete: 3 / 4 },
    dephasing: { gap: 1, complete: 1 },
    thermal: { gap: thermal, complete: thermal },
  }[noise];
  return [
    { constant: 'gap', relation: 'equals', value: gap, source: 'the least of the factors' },
    {
      constant: 'cge',
      relation: 'equals',
      value: complete,
      source: 'one qubit: NOTES.md; products: Wirth & Zhang, Commun. Math. Phys. 387 (2021)',
    },
  ];
};

function qubit(noise, beta, kit) {
  if (noise === 'depolarising') return kit.expectationModel({ algebra: [2], onto: 'scalars' });
  if (noise === 'dephasing') return kit.expectationModel({ algebra: [2], onto: 'diagonal' });
  return kit.balancedModel({
    state: kit.gibbsState([0, 1], beta),
    terms: [
      { label: 'emission', matrix: kit.matrixUnit(2, 0, 1), frequency: -beta },
      { label: 'absorption', matrix: kit.matrixUnit(2, 1, 0), frequency: beta },
    ],
  });
}
