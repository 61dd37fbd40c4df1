/** The jump K = u|0><1| + |1><0|/u with a weight, its two parts apart with the rest; σ_0/σ_1 = u⁴. */
export default ({ u, squeezing }, kit) => {
  const emission = kit.scale(u, kit.matrixUnit(2, 0, 1));
  const absorption = kit.scale(1 / u, kit.matrixUnit(2, 1, 0));
  const ratio = u * u * u * u;
  return kit.lindbladModel({
    title: `Qubit in a squeezed reservoir, u = ${u}, squeezing ${squeezing}`,
    state: kit.diagonal([ratio / (1 + ratio), 1 / (1 + ratio)]),
    jumps: [
      { label: 'both at once', rate: squeezing, matrix: kit.add(emission, absorption) },
      { label: 'emission', rate: 1 - squeezing, matrix: emission },
      { label: 'absorption', rate: 1 - squeezing, matrix: absorption },
    ].filter((jump) => jump.rate > 0),
  });
};

/** Curvature is claimed for a thermal bath only: elsewhere it is not defined. */
export const claims = ({ u, squeezing }) => {
  const mean = (u * u + 1 / (u * u)) / 2;
  const gap = {
    constant: 'gap',
    relation: 'equals',
    value: mean - squeezing,
    source: 'NOTES.md: decay of |0><1| + |1><0|',
  };
  if (squeezing > 0) return [gap];
  return [gap, { constant: 'cge', relation: 'equals', value: mean, source: 'the package thermal-qubit' }];
};
