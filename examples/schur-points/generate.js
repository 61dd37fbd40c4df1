/** A_ij ↦ −‖a_i − a_j‖² A_ij. */
export default ({ shape, size, spacing }, kit) =>
  kit.schurModel(points(shape, size, spacing), {
    title: `Schur multipliers of a ${shape}, size ${size}, spacing ${spacing}`,
  });

export const claims = ({ shape, size, spacing }) => {
  const least = spacing * spacing;
  const gap = { constant: 'gap', relation: 'equals', value: least, source: 'the least squared distance' };
  if (shape === 'cube' || size === 2) {
    return [gap, { constant: 'cge', relation: 'equals', value: least, source: 'NOTES.md: commuting reflections' }];
  }
  if (shape === 'line') {
    return [gap, { constant: 'cge', relation: 'at-least', value: 0, source: 'NOTES.md: commuting derivations' }];
  }
  return [
    gap,
    {
      constant: 'cge',
      relation: 'at-least',
      value: least / 2,
      source: 'NOTES.md: identity minus a conditional expectation',
    },
    { constant: 'cbe', relation: 'equals', value: least * (1 / 2 + 1 / size), source: 'NOTES.md: that of dephasing' },
  ];
};

function points(shape, size, spacing) {
  if (shape === 'line') return Array.from({ length: size }, (_, i) => [i * spacing]);
  if (shape === 'cube') {
    return Array.from({ length: 2 ** (size - 1) }, (_, i) =>
      Array.from({ length: size - 1 }, (_, k) => (Math.floor(i / 2 ** k) % 2) * spacing),
    );
  }
  // Unit vectors lie at distance √2.
  return Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (_, k) => (i === k ? spacing / Math.SQRT2 : 0)),
  );
}
