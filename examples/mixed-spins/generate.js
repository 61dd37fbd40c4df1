/**
 * Number operator of m self-adjoint unitaries with x_ix_j = s_ij x_jx_i, the signs independent with mean q: L = −k on products of
 * k distinct x_i. The jump U_j, a Pauli string, changes the sign of x_j and of no other; L = ½ Σ_j (U_j·U_j − id).
 */
export default ({ m, q, seed }, kit) => {
  const { pairs, central } = symplecticBasis(randomSigns(m, q, kit.random(seed)));
  return kit.lindbladModel({
    title: `${m} spins with commutation signs of mean ${q}, seed ${seed}`,
    algebra: new Array(2 ** central.length).fill(2 ** pairs.length),
    jumps: Array.from({ length: m }, (_, j) => ({
      label: `x${j + 1}`,
      rate: 1 / 2,
      matrix: kit.pauli(
        central.map((z) => (z[j] ? 'X' : 'I')).join('') + pairs.map((pair) => letter(pair, j)).join(''),
      ),
    })),
  });
};

export const claims = () => {
  const source = 'NOTES.md: reflections that commute or anticommute';
  return [
    { constant: 'gap', relation: 'equals', value: 1, source: 'NOTES.md: products of one spin' },
    ...['ge', 'cge', 'mlsi'].map((constant) => ({ constant, relation: 'equals', value: 1, source })),
  ];
};

/** Symmetric signs, 1 with probability (1+q)/2. */
function randomSigns(m, q, random) {
  const signs = Array.from({ length: m }, () => new Array(m).fill(1));
  for (let i = 0; i < m; i++) {
    for (let j = i + 1; j < m; j++) signs[i][j] = signs[j][i] = random.uniform() < (1 + q) / 2 ? 1 : -1;
  }
  return signs;
}

/** Products of the x_i as lists of m booleans: pairs that anticommute with each other only, and a basis of the centre. */
function symplecticBasis(signs) {
  const anticommute = (u, v) =>
    signs.flat().filter((s, k) => s < 0 && u[Math.floor(k / u.length)] && v[k % u.length]).length % 2 === 1;
  const times = (u, v) => u.map((bit, k) => bit !== v[k]);
  const pairs = [];
  const central = [];
  let rest = signs.map((_, j) => signs.map((_, k) => j === k));
  while (rest.length > 0) {
    const [u, ...others] = rest;
    const v = others.find((w) => anticommute(u, w));
    if (v === undefined) {
      central.push(u);
      rest = others;
      continue;
    }
    pairs.push([u, v]);
    const freed = others.filter((w) => w !== v);
    rest = freed
      .map((w) => (anticommute(w, v) ? times(w, u) : w))
      .map((w, k) => (anticommute(freed[k], u) ? times(w, v) : w));
  }
  return { pairs, central };
}

/** With X for u and Z for v: Z changes the sign of X alone, X that of Z, Y both. */
function letter([u, v], j) {
  if (u[j]) return v[j] ? 'Y' : 'Z';
  return v[j] ? 'X' : 'I';
}
