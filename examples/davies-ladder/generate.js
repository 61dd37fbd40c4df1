/** H = diag(0, 1, 1 + ratio), coupled to the bath by the steps of the ladder. */
export default ({ ratio, beta, cutoff, strength }, kit) => {
  const lower = kit.matrixUnit(3, 0, 1);
  const upper = kit.matrixUnit(3, 1, 2);
  const steps = kit.add(lower, upper);
  return kit.daviesModel({
    title: `Ladder with spacings 1 and ${ratio} in an ohmic bath, inverse temperature ${beta}`,
    hamiltonian: kit.diagonal([0, 1, 1 + ratio]),
    couplings: [kit.add(steps, kit.adjoint(steps))],
    beta,
    spectrum: { kind: 'ohmic', strength, cutoff },
  });
};

export const claims = (parameters, kit) => [
  {
    constant: 'gap',
    relation: 'equals',
    value: gap(parameters, kit),
    source: 'NOTES.md: a chain of three points and three coherences',
  },
];

function gap({ ratio, beta, cutoff, strength }, kit) {
  const rate = (w) => (strength * w * kit.exp(-Math.abs(w) / cutoff)) / -kit.expm1(-beta * w);
  const [up1, down1, up2, down2] = [rate(-1), rate(1), rate(-ratio), rate(ratio)];
  const trace = up1 + down1 + up2 + down2;
  const product = down1 * down2 + up1 * down2 + up1 * up2;
  // The smaller root of x² − trace x + product, without cancellation.
  const populations = (2 * product) / (trace + kit.sqrt(trace * trace - 4 * product));
  const coherences = [up1 + down1 + up2, down1 + up2 + down2, up1 + down2].map((sum) => sum / 2);
  return Math.min(populations, ...coherences);
}
