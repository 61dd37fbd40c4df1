/** Birth rate (N − x) p, death rate x q on x = 0…N. */
export default ({ balls, p, q }, kit) => {
  const steps = Array.from({ length: balls }, (_, x) => x);
  return kit.ratesModel(
    kit.birthDeathChain(
      steps.map((x) => (balls - x) * p),
      steps.map((x) => (x + 1) * q),
    ),
    { title: `Ehrenfest urn with ${balls} balls, rates ${p} and ${q}`, algebra: new Array(balls + 1).fill(1) },
  );
};

export const claims = ({ p, q }) => {
  const complete = (p + q) / 2 + Math.min(p, q);
  return [
    { constant: 'gap', relation: 'equals', value: p + q, source: 'NOTES.md: the number of balls is an eigenvector' },
    {
      constant: 'cge',
      relation: 'at-least',
      value: complete,
      source: 'NOTES.md: one ball, tensor powers, restriction',
    },
  ];
};
