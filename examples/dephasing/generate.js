/** L = γ (E − id), E the diagonal part. */
export default ({ n, rate }, kit) =>
  kit.expectationModel({ title: `Dephasing of ${n} levels`, algebra: [n], onto: 'diagonal', rate });

export const claims = ({ n, rate }) => [
  { constant: 'gap', relation: 'equals', value: rate, source: 'E − id is −1 on matrices with zero diagonal' },
  { constant: 'cbe', relation: 'equals', value: rate * (1 / 2 + 1 / n), source: 'NOTES.md, by hand' },
  ...curvature(n, rate),
];

function curvature(n, rate) {
  if (n > 2) {
    const source = 'Wirth & Zhang, Commun. Math. Phys. 387 (2021); NOTES.md: identity minus a conditional expectation';
    return [{ constant: 'cge', relation: 'at-least', value: rate / 2, source }];
  }
  const source = 'NOTES.md: a reflection from below, the gap from above';
  return ['cge', 'ge'].map((constant) => ({ constant, relation: 'equals', value: rate, source }));
}
