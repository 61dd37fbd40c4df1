/** Rate γ/n between any two of n points: L = γ (E − id), E the mean. */
export default ({ n, rate }) => ({
  schema: 'thalweg.model/1',
  title: `Random walk on the complete graph of ${n} points`,
  algebra: new Array(n).fill(1),
  generator: { form: 'expectation', onto: { scalars: true }, rate },
});

export const claims = ({ n, rate }) => [
  { constant: 'gap', relation: 'equals', value: rate, source: 'E − id is −1 on functions of mean 0' },
  {
    constant: 'cge',
    relation: 'at-least',
    value: rate / 2,
    source: 'Wirth & Zhang, Commun. Math. Phys. 387 (2021): identity minus a conditional expectation; NOTES.md',
  },
  { constant: 'be', relation: 'equals', value: rate * (1 / 2 + 1 / n), source: 'NOTES.md, by hand' },
  { constant: 'cbe', relation: 'equals', value: rate * (1 / 2 + 1 / n), source: 'NOTES.md, by hand' },
];
