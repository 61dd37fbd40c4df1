/** Hermitian jumps R_j with independent normal entries, E|R_ab|² = 1/n; their multiples of 1 are taken away. */
export default ({ n, jumps, seed }, kit) =>
  kit.lindbladModel({
    title: `${jumps} random Hermitian jump${jumps === 1 ? '' : 's'} on ${n} levels, seed ${seed}`,
    jumps: randomJumps(n, jumps, seed, kit),
  });

export const claims = ({ n, jumps, seed }, kit) => {
  const norms = randomJumps(n, jumps, seed, kit).map((r) => kit.trace(kit.multiply(r, r)).re);
  const mean = norms.reduce((sum, x) => sum + n * x, 0) / (n * n - 1);
  const least = { constant: 'gap', relation: 'at-most', value: mean, source: 'NOTES.md: mean of the eigenvalues' };
  // One jump alone leaves its own functions fixed.
  return jumps > 1 ? [least] : [];
};

function randomJumps(n, jumps, seed, kit) {
  const random = kit.random(seed);
  const deviation = kit.sqrt(1 / n);
  return Array.from({ length: jumps }, () => {
    const upper = Array.from({ length: n * n }, (_, k) => {
      const [i, j] = [Math.floor(k / n), k % n];
      const scale = i === j ? deviation / 2 : deviation / Math.SQRT2;
      const entry = { re: scale * random.normal(), im: scale * random.normal() };
      return i > j ? kit.zero(n) : kit.scale(entry, kit.matrixUnit(n, i, j));
    });
    const half = kit.add(...upper);
    const jump = kit.add(half, kit.adjoint(half));
    return kit.subtract(jump, kit.scale(kit.trace(jump).re / n, kit.identity(n)));
  });
}
