/** w (E_scalars − id) + (1 − w)(E_diagonal − id). */
export default ({ n, weight }, kit) =>
  kit.sumModel({
    title: `Depolarising with weight ${weight} and dephasing of ${n} levels`,
    terms: [
      { weight, model: kit.expectationModel({ algebra: [n], onto: 'scalars' }) },
      { weight: 1 - weight, model: kit.expectationModel({ algebra: [n], onto: 'diagonal' }) },
    ].filter((term) => term.weight > 0),
  });

export const claims = ({ n, weight }) => [
  { constant: 'gap', relation: 'equals', value: weight, source: 'NOTES.md: populations' },
  ...(n === 2
    ? [{ constant: 'cge', relation: 'at-least', value: weight / 2, source: 'NOTES.md: anticommuting reflections' }]
    : []),
];
