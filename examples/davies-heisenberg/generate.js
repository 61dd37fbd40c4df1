/** H = J/4 (XX + YY + ZZ), coupled to the bath by all three components of the first spin. */
export default ({ exchange, beta, cutoff, strength }, kit) => {
  const bond = exchange / 4;
  return kit.daviesModel({
    title: `Heisenberg pair with exchange ${exchange}, an ohmic bath of inverse temperature ${beta} at one end`,
    hamiltonian: { pauli: { XX: bond, YY: bond, ZZ: bond } },
    couplings: [kit.pauli('XI'), kit.pauli('YI'), kit.pauli('ZI')],
    beta,
    spectrum: { kind: 'ohmic', strength, cutoff },
  });
};

export const claims = (parameters, kit) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: gap(parameters, kit),
    source: 'NOTES.md: rotation symmetry splits L into five numbers',
  },
];

function gap({ exchange, beta, cutoff, strength }, kit) {
  const rate = (w) => (strength * w * kit.exp(-Math.abs(w) / cutoff)) / -kit.expm1(-beta * w);
  const [down, up, still] = [rate(exchange), rate(-exchange), strength / beta];
  return Math.min(down + 3 * up, still + down, still + (down + 3 * up) / 2);
}
