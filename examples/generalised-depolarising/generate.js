/** L(A) = γ (Tr(σA) − A) on n levels, σ = diag(s, r, …, r). */
export default ({ n, s, rate }, kit) => {
  const weights = levels(n, s);
  return kit.lindbladModel({
    title: `Depolarising on ${n} levels to a state with first weight ${s}`,
    state: kit.diagonal(weights),
    jumps: weights.flatMap((weight, a) =>
      weights.map((_, b) => ({ label: `${b} to ${a}`, rate: rate * weight, matrix: kit.matrixUnit(n, a, b) })),
    ),
  });
};

/** Every constant is a rate, so it is γ times its value at γ = 1. */
export const claims = ({ n, s, rate }, kit) => {
  const weights = levels(n, s);
  const least = Math.min(...weights);
  const inverse = weights.reduce((sum, x) => sum + 1 / x, 0);
  return [
    { constant: 'gap', relation: 'equals', value: rate, source: 'L is −1 on the kernel of Tr(σ·)' },
    { constant: 'be', relation: 'equals', value: rate * (1 / 2 + least / (1 + least)), source: 'NOTES.md, by hand' },
    { constant: 'cbe', relation: 'equals', value: rate * (1 / 2 + 1 / inverse), source: 'NOTES.md, by hand' },
    { constant: 'cge', relation: 'at-least', value: rate / 2, source: 'NOTES.md: the metric is concave in the state' },
    {
      constant: 'mlsi',
      relation: 'equals',
      value: rate * entropyRate(least, kit),
      convention: 'two-alpha',
      source: 'Müller-Hermes, Stilck França & Wolf, J. Math. Phys. 57 (2016): the smallest eigenvalue decides',
    },
  ];
};

function levels(n, s) {
  return [s, ...new Array(n - 1).fill((1 - s) / (n - 1))];
}

/** min over 0 < x < 1 of ½(1 + d(s,x)/d(x,s)), d the relative entropy of two bits; the minimum lies between s and 1. */
function entropyRate(s, kit) {
  if (s >= 1 / 2) return 1;
  const d = (x, y) => x * excess((y - x) / x, kit) + (1 - x) * excess((x - y) / (1 - x), kit);
  return minimum((x) => (1 + d(s, x) / d(x, s)) / 2, (s + 1 / 2) / 2, 1);
}

/** t − log(1+t), by its series where the two cancel. */
function excess(t, kit) {
  if (t * t > 0.01) return t - kit.log1p(t);
  let sum = 0;
  for (let k = 24; k >= 2; k--) sum = 1 / k - t * sum;
  return t * t * sum;
}

/** The least value on an open interval of a function with one minimum, by thirds. */
function minimum(f, from, to) {
  let [low, high] = [from, to];
  for (let step = 0; step < 120; step++) {
    const third = (high - low) / 3;
    if (f(low + third) < f(high - third)) high -= third;
    else low += third;
  }
  return f((low + high) / 2);
}
