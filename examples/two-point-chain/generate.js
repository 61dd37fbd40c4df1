/** Rates p from 0 to 1 and q from 1 to 0. */
export default ({ p, q }) => ({
  schema: 'thalweg.model/1',
  title: `Chain on two points with rates ${p} and ${q}`,
  algebra: [1, 1],
  generator: {
    form: 'rates',
    rates: [
      [0, p],
      [q, 0],
    ],
  },
});

export const claims = ({ p, q }, kit) => {
  const complete = (p + q) / 2 + Math.min(p, q);
  return [
    { constant: 'gap', relation: 'equals', value: p + q, source: 'a two-by-two matrix of trace −(p + q)' },
    {
      constant: 'ge',
      relation: 'equals',
      value: maasConstant(p, q, kit),
      source: 'Maas, J. Funct. Anal. 261 (2011), Section 2',
    },
    { constant: 'be', relation: 'equals', value: complete, source: 'NOTES.md, by hand' },
    { constant: 'cbe', relation: 'equals', value: complete, source: 'NOTES.md, by hand' },
    {
      constant: 'cge',
      relation: 'equals',
      value: complete,
      source: 'NOTES.md: explicit lift from below, cbe from above',
    },
  ];
};

/** (p+q)/2 + inf over −1 < b < 1 of Λ(q(1−b), p(1+b))/(1−b²), Λ the logarithmic mean. */
function maasConstant(p, q, kit) {
  const quotient = (b) => logarithmicMean(q * (1 - b), p * (1 + b), kit) / ((1 - b) * (1 + b));
  return (p + q) / 2 + minimum(quotient, -1, 1);
}

/** The series of artanh where the arguments are close: no cancellation. */
function logarithmicMean(x, y, kit) {
  const t = (x - y) / (x + y);
  if (t * t > 0.01) return (x - y) / (kit.log(x) - kit.log(y));
  let sum = 0;
  for (let k = 20; k >= 0; k--) sum = sum * t * t + 1 / (2 * k + 1);
  return (x + y) / (2 * sum);
}

/** The least value on an open interval of a function with one minimum, by thirds. */
function minimum(f, from, to) {
  let [low, high] = [from, to];
  for (let step = 0; step < 200; step++) {
    const third = (high - low) / 3;
    if (f(low + third) < f(high - third)) high -= third;
    else low += third;
  }
  return f((low + high) / 2);
}
