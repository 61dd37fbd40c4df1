/** Jumps V = √γ_i σ_i/2: L(A) = Σ γ_i/2 (σ_iAσ_i − A). A rate 0 leaves its jump out. */
export default ({ x, y, z }, kit) =>
  kit.lindbladModel({
    title: `Pauli flips with rates ${x}, ${y}, ${z}`,
    algebra: [2],
    jumps: present(x, y, z).map(([string, rate]) => ({ label: string, rate: rate / 2, matrix: kit.pauli(string) })),
  });

export const claims = ({ x, y, z }) => {
  const rates = present(x, y, z).map(([, rate]) => rate);
  if (rates.length === 0) return [];
  const [most, middle = 0, least = 0] = [...rates].sort((a, b) => b - a);
  const reflections = {
    constant: 'cge',
    relation: 'at-least',
    value: Math.min(...rates),
    source: 'NOTES.md: reflections that anticommute',
  };
  // One flip alone is dephasing: what does not decay is a fixed point.
  const gap = rates.length === 1 ? most : middle + least;
  return [
    { constant: 'gap', relation: 'equals', value: gap, source: 'the Pauli matrices are eigenvectors' },
    reflections,
  ];
};

function present(x, y, z) {
  const all = [
    ['X', x],
    ['Y', y],
    ['Z', z],
  ];
  return all.filter(([, rate]) => rate > 0);
}
