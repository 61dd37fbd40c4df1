/** The product of d chains on two points, the given rate along every edge of {0,1}^d. */
export default ({ d, rate }) => ({
  schema: 'thalweg.model/1',
  title: `Random walk on the hypercube of dimension ${d}`,
  generator: {
    form: 'tensor',
    factors: Array.from({ length: d }, () => ({
      generator: {
        form: 'rates',
        rates: [
          [0, rate],
          [rate, 0],
        ],
      },
    })),
  },
});

export const claims = ({ rate }) => [
  { constant: 'gap', relation: 'equals', value: 2 * rate, source: 'Walsh functions' },
  { constant: 'ge', relation: 'equals', value: 2 * rate, source: 'Erbar & Maas, Arch. Ration. Mech. Anal. 206 (2012)' },
  {
    constant: 'cge',
    relation: 'equals',
    value: 2 * rate,
    source: 'NOTES.md: lift on two points, stable under products',
  },
];
