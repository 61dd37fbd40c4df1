/** Largest |x| of sin and cos: beyond, the reduction modulo π/2 would need more than three parts of π/2. */
const LARGEST = 2 ** 19;

const INVERSE_HALF_PI = 6.36619772367581382433e-1;
/** π/2 in three parts of 33 bits, whose products with a number of quarter turns are exact, and what is left. */
const HALF_PI = [1.57079632673412561417, 6.0771005063039659766e-11, 2.0222662487111664558e-21] as const;
const HALF_PI_REST = 8.47842766036889956997e-32;

const S = [
  -1.66666666666666324348e-1, 8.33333333332248946124e-3, -1.98412698298579493134e-4, 2.75573137070700676789e-6,
  -2.50507602534068634195e-8, 1.58969099521155010221e-10,
] as const;

const C = [
  4.16666666666666019037e-2, -1.38888888888741095749e-3, 2.48015872894767294178e-5, -2.75573143513906633035e-7,
  2.0875723212981748279e-9, -1.13596475577881948265e-11,
] as const;

/** sin x for |x| ≤ 2^19 (kernels of fdlibm's k_sin.c and k_cos.c, Sun Microsystems 1993). Throws beyond, and for NaN. */
export function sin(x: number): number {
  const [turns, r, tail] = reduced(x, 'sin');
  const value = turns % 2 === 0 ? sine(r, tail) : cosine(r, tail);
  return turns < 2 ? value : -value;
}

/** cos x for |x| ≤ 2^19. Throws beyond, and for NaN. */
export function cos(x: number): number {
  const [turns, r, tail] = reduced(x, 'cos');
  const value = turns % 2 === 0 ? cosine(r, tail) : sine(r, tail);
  return turns === 0 || turns === 3 ? value : -value;
}

/** Number of quarter turns modulo 4, and x minus them as a sum of two doubles, |r| ≤ π/4. */
function reduced(x: number, name: string): [number, number, number] {
  if (!(Math.abs(x) <= LARGEST)) throw new RangeError(`expected ${name} of a number from −2^19 to 2^19, got ${x}`);
  if (Math.abs(x) <= 0.7853981633974483) return [0, x, 0];
  const n = Math.floor(x * INVERSE_HALF_PI + 0.5);
  let r = x;
  let lost = 0;
  for (const part of HALF_PI) {
    const before = r;
    const step = n * part;
    r = before - step;
    const taken = r - before;
    lost += before - (r - taken) - (step + taken);
  }
  const w = n * HALF_PI_REST - lost;
  const y = r - w;
  return [((n % 4) + 4) % 4, y, r - y - w];
}

function sine(x: number, tail: number): number {
  const z = x * x;
  const v = z * x;
  const r = S[1] + z * (S[2] + z * (S[3] + z * (S[4] + z * S[5])));
  return x - (z * (0.5 * tail - v * r) - tail - v * S[0]);
}

function cosine(x: number, tail: number): number {
  const z = x * x;
  const w = z * z;
  const r = z * (C[0] + z * (C[1] + z * C[2])) + w * w * (C[3] + z * (C[4] + z * C[5]));
  const half = 0.5 * z;
  const v = 1 - half;
  return v + (1 - v - half + (z * r - x * tail));
}
