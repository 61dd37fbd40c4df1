/** λ_g ↦ −γ ℓ(g) λ_g with ℓ(g) = min(g, n − g). */
export default ({ n, rate }, kit) =>
  kit.lengthModel(
    kit.cyclicGroup(n),
    kit.wordLength(kit.cyclicGroup(n)).map((length) => rate * length),
    { title: `Word length on the cyclic group of order ${n}` },
  );

export const claims = ({ n, rate }) => {
  const gap = { constant: 'gap', relation: 'equals', value: rate, source: 'the least length of an element' };
  if (n % 2 === 1) {
    return [
      gap,
      { constant: 'cge', relation: 'at-least', value: rate / 2, source: 'NOTES.md: half of a sum of walls' },
    ];
  }
  const source = 'NOTES.md: a sum of walls from below, the gap from above';
  return [gap, ...['ge', 'cge', 'cbe'].map((constant) => ({ constant, relation: 'equals', value: rate, source }))];
};
