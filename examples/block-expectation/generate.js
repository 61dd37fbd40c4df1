/** L = γ (E − id), E the pinching onto equal blocks along the diagonal. */
export default ({ blocks, size, rate }, kit) =>
  kit.expectationModel({
    title: `Pinching onto ${blocks} blocks of ${size} levels`,
    algebra: [blocks * size],
    onto: { blocks: new Array(blocks).fill(size) },
    rate,
  });

export const claims = ({ blocks, rate }) => [
  { constant: 'gap', relation: 'equals', value: rate, source: 'E − id is −1 on matrices with zero blocks' },
  { constant: 'cbe', relation: 'equals', value: rate * (1 / 2 + 1 / blocks), source: 'NOTES.md, by hand' },
  curvature(blocks, rate),
];

function curvature(blocks, rate) {
  if (blocks === 2) {
    return { constant: 'cge', relation: 'equals', value: rate, source: 'NOTES.md: one reflection' };
  }
  const source = 'Wirth & Zhang, Commun. Math. Phys. 387 (2021): identity minus a conditional expectation';
  return { constant: 'cge', relation: 'at-least', value: rate / 2, source };
}
