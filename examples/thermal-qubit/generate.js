/** Canonical form with V = √γ|0><1| and its adjoint, frequencies ∓β. */
export default ({ beta, gamma }, kit) => {
  const emission = kit.scale(Math.sqrt(gamma), kit.matrixUnit(2, 0, 1));
  return kit.balancedModel({
    title: `Qubit in a bath of inverse temperature ${beta}`,
    state: kit.gibbsState([0, 1], beta),
    terms: [
      { label: 'emission', matrix: emission, frequency: -beta },
      { label: 'absorption', matrix: kit.adjoint(emission), frequency: beta },
    ],
  });
};

export const claims = ({ beta, gamma }, kit) => {
  const value = 2 * gamma * kit.cosh(beta / 2);
  const source = 'NOTES.md: explicit lift from below, decay of the coherence from above';
  return [
    { constant: 'gap', relation: 'equals', value, source: 'NOTES.md: decay of the coherence' },
    ...['ge', 'cge', 'mlsi', 'clsi'].map((constant) => ({ constant, relation: 'equals', value, source })),
  ];
};
