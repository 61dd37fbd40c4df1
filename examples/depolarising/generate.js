/** L(A) = γ (Tr(A)/n − A) on n levels. */
export default ({ n, rate }) => ({
  schema: 'thalweg.model/1',
  title: `Depolarising semigroup on ${n} levels`,
  algebra: [n],
  generator: { form: 'expectation', onto: { scalars: true }, rate },
});

/** Every constant is a rate, so it is γ times its value at γ = 1. */
export const claims = ({ n, rate }, kit) => [
  { constant: 'gap', relation: 'equals', value: rate, source: 'E − id is −1 on the traceless matrices' },
  {
    constant: 'cge',
    relation: 'at-least',
    value: rate / 2,
    source: 'Wirth & Zhang, Commun. Math. Phys. 387 (2021): identity minus a conditional expectation',
  },
  {
    constant: 'cbe',
    relation: 'equals',
    value: rate * (1 / 2 + 1 / (n * n)),
    source: 'NOTES.md, from the norm of the multiplication of traceless matrices with vectors',
  },
  {
    constant: 'be',
    relation: 'equals',
    value: rate * (1 / 2 + 1 / (n + 1)),
    source: 'NOTES.md, from A*A ≤ n E(A*A) with equality for A of rank one',
  },
  {
    constant: 'lsi',
    relation: 'equals',
    value: rate * (n === 2 ? 1 : (2 * (1 - 2 / n)) / kit.log(n - 1)),
    source:
      'Diaconis & Saloff-Coste, Ann. Appl. Probab. 6 (1996) for the complete graph; Müller-Hermes, Stilck França & Wolf, J. Math. Phys. 57 (2016)',
  },
];
