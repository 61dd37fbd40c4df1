/** Chain on 0…n−1: x to x+1 with rate up, x+1 to x with rate down. */
export default ({ n, up, down }, kit) =>
  kit.ratesModel(kit.birthDeathChain(new Array(n - 1).fill(up), new Array(n - 1).fill(down)), {
    title: `Birth and death on ${n} points with rates ${up} and ${down}`,
    algebra: new Array(n).fill(1),
  });

export const claims = ({ n, up, down }, kit) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: up + down - 2 * kit.sqrt(up * down) * kit.rootOfUnity(1, 2 * n).re,
    source: 'NOTES.md: a tridiagonal matrix with constant diagonals',
  },
  ...curvature(n),
];

function curvature(n) {
  if (n < 5) return [{ constant: 'cge', relation: 'at-least', value: 0, source: 'NOTES.md: explicit lift' }];
  const source = 'NOTES.md: explicit lift from below, a function that is linear on five points from above';
  return ['cge', 'be'].map((constant) => ({ constant, relation: 'equals', value: 0, source }));
}
