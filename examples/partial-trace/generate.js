/** L = γ (E − id), E(A ⊗ B) = Tr(A)/n ⊗ B, the expectation onto 1 ⊗ M_m. */
export default ({ n, m, rate }, kit) => {
  const units = Array.from({ length: m * m }, (_, k) => kit.matrixUnit(m, Math.floor(k / m), k % m));
  return kit.expectationModel({
    title: `Depolarising ${n} levels beside ${m} that are left alone`,
    algebra: [n * m],
    onto: { spannedBy: units.map((unit) => kit.kron(kit.identity(n), unit)) },
    rate,
  });
};

export const claims = ({ n, rate }) => {
  const complete = rate * (1 / 2 + 1 / (n * n));
  return [
    { constant: 'gap', relation: 'equals', value: rate, source: 'E − id is −1 on the kernel of E' },
    { constant: 'cbe', relation: 'equals', value: complete, source: 'NOTES.md: that of the depolarising semigroup' },
    n === 2
      ? {
          constant: 'cge',
          relation: 'equals',
          value: complete,
          source: 'NOTES.md: lift for one qubit, with an ancilla',
        }
      : {
          constant: 'cge',
          relation: 'at-least',
          value: rate / 2,
          source: 'Wirth & Zhang, Commun. Math. Phys. 387 (2021): identity minus a conditional expectation',
        },
  ];
};
