import type { GeneratorRun } from '../../src/generator-run.js';

const sample = (body: string, parameters: GeneratorRun['parameters'] = {}): GeneratorRun => ({
  source: `export default (parameters, kit) => {\n${body}\n};`,
  parameters,
  want: 'model',
});

/** Every function of the kit on many arguments, and generators of every form: what they give must not depend on where they run. */
export const SAMPLES: Readonly<Record<string, GeneratorRun>> = {
  'elementary functions': sample(`
    const random = kit.random('functions');
    const names = ['exp', 'expm1', 'log', 'log1p', 'sin', 'cos', 'sinh', 'cosh', 'tanh', 'sqrt'];
    const values = names.map((name) => Array.from({ length: 200 }, () => {
      const x = kit.exp(12 * random.uniform() - 6);
      return kit[name](['sin', 'cos', 'sinh', 'cosh', 'tanh', 'exp', 'expm1'].includes(name) && random.uniform() < 0.5 ? -x : x);
    }));
    const powers = Array.from({ length: 200 }, () => kit.pow(10 * random.uniform(), 40 * random.uniform() - 20));
    const turns = Array.from({ length: 60 }, (_, k) => kit.rootOfUnity(k, 59));
    const native = [Math.exp(0.3), Math.pow(1.7, 0.3), 1.7 ** 0.3, 10 ** -7.5, Math.sqrt(2), 0.1 + 0.2, 1e21, 5e-324];
    return { values, powers, turns, native };`),
  'random numbers': sample(
    `const random = kit.random(parameters.seed);
    return Array.from({ length: 300 }, () => [random.uniform(), random.normal(), random.integer(97)]);`,
    { seed: 'a seed' },
  ),
  'jumps with a Hamiltonian': sample(
    `const { n, g } = parameters;
    const sites = Array.from({ length: n }, (_, k) => kit.site(n, k, kit.pauli('Z')));
    const bonds = Array.from({ length: n - 1 }, (_, k) => kit.sites(n, [[k, kit.pauli('X')], [k + 1, kit.pauli('X')]]));
    const hamiltonian = kit.add(kit.scale(g, kit.add(...sites)), ...bonds);
    const jumps = sites.map((matrix, k) => ({ label: 'Z' + k, rate: kit.exp(-k / 3), matrix }));
    return kit.lindbladModel({ title: 'chain', hamiltonian, jumps });`,
    { n: 4, g: 0.7 },
  ),
  'a thermal oscillator': sample(
    `const { levels, beta } = parameters;
    const energies = Array.from({ length: levels }, (_, k) => k);
    const terms = [
      { label: 'a', matrix: kit.scale(kit.exp(beta / 4), kit.annihilation(levels)), frequency: -beta },
      { label: 'a*', matrix: kit.scale(kit.exp(-beta / 4), kit.creation(levels)), frequency: beta },
    ];
    return kit.balancedModel({ state: kit.gibbsState(energies, beta), terms });`,
    { levels: 8, beta: 0.9 },
  ),
  'Weyl jumps': sample(
    `const n = parameters.n;
    const jumps = [];
    for (let a = 0; a < n; a++) for (let b = 0; b < n; b++) if (a + b > 0) jumps.push({ rate: 1 / n, matrix: kit.weyl(n, a, b) });
    return kit.lindbladModel({ jumps });`,
    { n: 5 },
  ),
  fermions: sample(`
    const jumps = Array.from({ length: 6 }, (_, k) => kit.majorana(3, k));
    return kit.lindbladModel({ jumps, hamiltonian: kit.multiply(kit.fermionCreation(3, 0), kit.fermionAnnihilation(3, 0)) });`),
  spins: sample(`
    const [x, y, z] = [kit.spinX(1.5), kit.spinY(1.5), kit.spinZ(1.5)];
    return kit.daviesModel({ hamiltonian: z, couplings: [x, y], beta: 0.4, spectrum: { kind: 'ohmic', strength: 1, cutoff: 3 } });`),
  graphs: sample(`
    const graphs = [kit.gridGraph([3, 4], kit.pow(2, 0.3)), kit.hypercubeGraph(4), kit.cycleGraph(7), kit.birthDeathChain([0.1, 0.2], [0.3, 0.7])];
    return kit.tensorModel(graphs.map((rates) => kit.ratesModel(rates)));`),
  groups: sample(`
    const group = kit.dihedralGroup(5);
    return [kit.lengthModel(group, kit.wordLength(group).map((l) => l / 3)), kit.lengthModel(kit.symmetricGroup(4), 'word')];`),
  'sums and texts': sample(`
    const one = kit.expectationModel({ algebra: [2, 1], onto: 'diagonal', title: 'ü €', rate: 1 / 3 });
    return { model: kit.sumModel({ terms: [{ weight: kit.log(2), model: one }] }), text: 'é\\u0000"\\\\ \\u2028 \\ud83d\\ude00', sorted: [10, 9, 1].sort() };`),
};
