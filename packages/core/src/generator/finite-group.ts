import { ThalwegError } from '../errors.js';

/** A finite group as a document names it. */
export type GroupForm =
  | { readonly cyclic: number }
  | { readonly dihedral: number }
  | { readonly symmetric: number }
  | { readonly table: readonly (readonly number[])[] };

export interface FiniteGroup {
  readonly order: number;
  /** product[g * order + h] is the index of gh. */
  readonly product: Int32Array;
  readonly inverse: Int32Array;
  readonly identity: number;
  /** The usual generators, closed under inverses; null for a group given by its table. */
  readonly generators: readonly number[] | null;
}

/** Largest order: the left regular representation is decomposed as dense matrices of this side. */
const MAX_GROUP_ORDER = 128;

const POINTER = '/generator/group';

/**
 * The group of a document. Elements of cyclic n are 0…n−1 (generators ±1); of dihedral n the rotations r^0…r^{n−1}, then the
 * reflections r^k s (generators r, r⁻¹, s); of symmetric n the permutations in lexicographic one-line order, (gh)(x) = g(h(x))
 * (generators: adjacent transpositions). A table is checked to be a group. Throws `not-a-group`, `too-large`, `usage`.
 */
export function finiteGroup(form: GroupForm): FiniteGroup {
  if ('cyclic' in form) return cyclic(size(form.cyclic, 'cyclic', (n) => n));
  if ('dihedral' in form) return dihedral(size(form.dihedral, 'dihedral', (n) => 2 * n));
  if ('symmetric' in form) return symmetric(size(form.symmetric, 'symmetric', factorial));
  return fromTable(form.table);
}

function size(n: number, name: string, order: (n: number) => number): number {
  if (!Number.isInteger(n) || n < 1) {
    throw new ThalwegError('usage', `expected "${name}" to be a whole number of at least 1, got ${n}; correct it`, {
      pointer: `${POINTER}/${name}`,
    });
  }
  requireOrder(order(n), `${POINTER}/${name}`);
  return n;
}

function requireOrder(order: number, pointer: string): void {
  if (order <= MAX_GROUP_ORDER) return;
  throw new ThalwegError(
    'too-large',
    `expected a group of order at most ${MAX_GROUP_ORDER}, got ${order}; take a smaller group`,
    {
      pointer,
      details: { limit: MAX_GROUP_ORDER, order },
    },
  );
}

function factorial(n: number): number {
  return n <= 1 ? 1 : n * factorial(n - 1);
}

function cyclic(n: number): FiniteGroup {
  return build(n, (g, h) => (g + h) % n, [1 % n, (n - 1) % n]);
}

/** r^a s^e r^b s^f = r^{a + (−1)^e b} s^{e+f}. */
function dihedral(n: number): FiniteGroup {
  const product = (g: number, h: number): number => {
    const turn = g < n ? h % n : n - (h % n);
    return (((g % n) + turn) % n) + (g < n === h < n ? 0 : n);
  };
  return build(2 * n, product, [1 % n, (n - 1) % n, n]);
}

function symmetric(n: number): FiniteGroup {
  const elements = permutations(Array.from({ length: n }, (_, k) => k));
  const place = new Map(elements.map((e, k) => [e.join(), k]));
  const product = (g: number, h: number): number => place.get(elements[h].map((x) => elements[g][x]).join()) as number;
  const transpositions = Array.from({ length: n - 1 }, (_, k) => {
    const e = Array.from({ length: n }, (_, x) => (x === k ? k + 1 : x === k + 1 ? k : x));
    return place.get(e.join()) as number;
  });
  return build(elements.length, product, transpositions);
}

/** In lexicographic order when the items ascend. */
function permutations(items: readonly number[]): number[][] {
  if (items.length === 0) return [[]];
  return items.flatMap((x) => permutations(items.filter((y) => y !== x)).map((rest) => [x, ...rest]));
}

function fromTable(table: readonly (readonly number[])[]): FiniteGroup {
  const pointer = `${POINTER}/table`;
  const n = table.length;
  requireOrder(n, pointer);
  table.forEach((row, g) => {
    const whole = row.length === n && row.every((x) => Number.isInteger(x) && x >= 0 && x < n);
    if (!whole || new Set(row).size !== n) {
      notAGroup(`row ${g} to hold each of 0…${n - 1} once`, `[${row.join(', ')}]`, `${pointer}/${g}`);
    }
  });
  for (let h = 0; h < n; h++) {
    const column = table.map((row) => row[h]);
    if (new Set(column).size === n) continue;
    notAGroup(`column ${h} to hold each of 0…${n - 1} once`, `[${column.join(', ')}]`, pointer);
  }
  if (n === 0 || !table.some((row) => row.every((x, h) => x === h))) notAGroup('an identity element', 'none', pointer);
  const group = build(n, (g, h) => table[g][h], null);
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const ab = table[a][b];
      const c = table[ab].findIndex((x, h) => x !== table[a][table[b][h]]);
      if (c < 0) continue;
      notAGroup(
        'an associative product',
        `(${a}·${b})·${c} = ${table[ab][c]} but ${a}·(${b}·${c}) = ${table[a][table[b][c]]}`,
        pointer,
      );
    }
  }
  return group;
}

function notAGroup(expected: string, got: string, pointer: string): never {
  throw new ThalwegError('not-a-group', `expected ${expected} in the multiplication table, got ${got}`, { pointer });
}

function build(
  order: number,
  multiply: (g: number, h: number) => number,
  generators: readonly number[] | null,
): FiniteGroup {
  const product = new Int32Array(order * order);
  for (let g = 0; g < order; g++) for (let h = 0; h < order; h++) product[g * order + h] = multiply(g, h);
  const identity = Array.from({ length: order }, (_, g) => g).findIndex((g) => product[g * order + g] === g);
  const inverse = Int32Array.from({ length: order }, (_, g) =>
    product.subarray(g * order, (g + 1) * order).indexOf(identity),
  );
  return { order, product, inverse, identity, generators };
}
