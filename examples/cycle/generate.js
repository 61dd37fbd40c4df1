/** The given rate along every edge of a cycle of n points. */
export default ({ n, rate }) => ({
  schema: 'thalweg.model/1',
  title: `Random walk on a cycle of ${n} points`,
  algebra: new Array(n).fill(1),
  generator: {
    form: 'rates',
    rates: Array.from({ length: n }, (_, x) =>
      Array.from({ length: n }, (_, y) => ((x - y + n) % n === 1 || (y - x + n) % n === 1 ? rate : 0)),
    ),
  },
});

export const claims = ({ n, rate }, kit) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: 2 * rate * (1 - kit.rootOfUnity(1, n).re),
    source: 'characters of the cyclic group',
  },
  ...curvature(n, rate),
];

function curvature(n, rate) {
  if (n === 3) {
    return [
      {
        constant: 'cbe',
        relation: 'equals',
        value: (5 / 2) * rate,
        source: 'NOTES.md: complete graph of three points',
      },
      {
        constant: 'cge',
        relation: 'at-least',
        value: (3 / 2) * rate,
        source: 'NOTES.md: three times an expectation minus the identity',
      },
    ];
  }
  if (n === 4) {
    return [
      {
        constant: 'ge',
        relation: 'equals',
        value: 2 * rate,
        source: 'Erbar & Maas, Arch. Ration. Mech. Anal. 206 (2012): hypercube',
      },
      { constant: 'cge', relation: 'equals', value: 2 * rate, source: 'NOTES.md: product of two chains on two points' },
    ];
  }
  return [
    { constant: 'be', relation: 'equals', value: 0, source: 'NOTES.md: a function that is linear on five points' },
    { constant: 'cge', relation: 'equals', value: 0, source: 'NOTES.md: at least 0 by the lift, at most cbe = 0' },
  ];
}
