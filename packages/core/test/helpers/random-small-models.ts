import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { pauliJumps } from '../../src/families/pauli-jumps.js';
import { weylJumps } from '../../src/families/weyl-jumps.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { type ComplexMatrix, zeros } from '../../src/linalg/complex-matrix.js';
import { type Random, seededRandom } from '../../src/random.js';
import { randomBalancedGenerator } from './random-balanced-generator.js';

/** A family of small models, one for each random stream. */
export interface RandomFamily {
  readonly name: string;
  readonly make: (random: Random) => Generator;
}

/** Qubits, qutrits with two to four jumps, blocks, and chains up to six points. */
export const RANDOM_FAMILIES: readonly RandomFamily[] = [
  { name: 'qubits, Pauli jumps', make: pauliQubit },
  { name: 'qubits with frequencies', make: (random) => randomBalancedGenerator(blockAlgebra([2]), random).generator },
  { name: 'qutrits, Weyl jumps', make: weylQutrit },
  { name: 'qutrits, symmetric hopping', make: (random) => hopping([3], random, false) },
  { name: 'qutrits, jumps between levels', make: (random) => hopping([3], random, true) },
  { name: 'qutrits, Hermitian jumps', make: hermitianQutrit },
  { name: 'a qubit and a point', make: (random) => hopping([2, 1], random, true) },
  { name: 'chains of 2 to 6 points', make: chain },
];

/** Model number k: its family, and the generator. */
export function randomSmallModel(k: number): { readonly family: string; readonly generator: Generator } {
  const { name, make } = RANDOM_FAMILIES[k % RANDOM_FAMILIES.length];
  return { family: name, generator: make(seededRandom(`small model ${k}`)) };
}

/** Rates from 0.2 to 2. */
function rate(random: Random): number {
  return 0.2 + 1.8 * random.uniform();
}

function pauliQubit(random: Random): Generator {
  const count = 2 + random.integer(2);
  return pauliJumps(['X', 'Y', 'Z'].slice(0, count).map((string) => ({ string, rate: rate(random) })));
}

/** Two of the four pairs of Weyl operators of order 3. */
function weylQutrit(random: Random): Generator {
  const pairs = [
    { a: 1, b: 0 },
    { a: 0, b: 1 },
    { a: 1, b: 1 },
    { a: 1, b: 2 },
  ];
  pairs.splice(random.integer(4), 1);
  pairs.splice(random.integer(3), 1);
  return weylJumps(
    3,
    pairs.map((pair) => ({ ...pair, rate: rate(random) })),
  );
}

/** Jumps e_ab both ways along one or two pairs of levels; rates in detailed balance with a random state, or equal. */
function hopping(blocks: readonly number[], random: Random, withState: boolean): Generator {
  const weights = [1, 2, 3].map(() => (withState ? Math.exp(random.normal()) : 1));
  const pairs = [
    [0, 1],
    [1, 2],
    [0, 2],
  ].filter((_, k) => k < 2 && (k === 1 || random.uniform() < 0.8));
  const jumps = pairs.flatMap(([a, b]) => {
    const strength = rate(random);
    return [
      { matrix: unit(3, a, b), rate: strength / weights[b] },
      { matrix: unit(3, b, a), rate: strength / weights[a] },
    ];
  });
  return lindbladGenerator({ algebra: blockAlgebra([...blocks]), jumps });
}

function hermitianQutrit(random: Random): Generator {
  const jumps = Array.from({ length: 2 + random.integer(3) }, () => ({ matrix: hermitian(random) }));
  return lindbladGenerator({ algebra: blockAlgebra([3]), jumps });
}

function hermitian(random: Random): ComplexMatrix {
  const out = zeros(3);
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j <= i; j++) {
      const [re, im] = [random.normal() / 2, i === j ? 0 : random.normal() / 2];
      [out.re[3 * i + j], out.im[3 * i + j]] = [re, im];
      [out.re[3 * j + i], out.im[3 * j + i]] = [re, -im];
    }
  }
  return out;
}

function unit(n: number, a: number, b: number): ComplexMatrix {
  const out = zeros(n);
  out.re[a * n + b] = 1;
  return out;
}

/** A path of points, and some more edges, with conductances and a random reversible state. */
function chain(random: Random): Generator {
  const n = 2 + random.integer(5);
  const weights = Array.from({ length: n }, () => Math.exp(random.normal() / 2));
  const rates = weights.map(() => new Array<number>(n).fill(0));
  for (let x = 0; x < n; x++) {
    for (let y = 0; y < x; y++) {
      if (y < x - 1 && random.uniform() > 0.25) continue;
      const strength = rate(random);
      rates[x][y] = strength / weights[x];
      rates[y][x] = strength / weights[y];
    }
  }
  return ratesGenerator(rates);
}
