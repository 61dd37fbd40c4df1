import { expmReal } from '../linalg/expm-real.js';

/** P_t†ρ in coordinates, L being the D×D matrix on observables. */
export function flowed(generator: Float64Array, rho: Float64Array, time: number): Float64Array {
  if (time === 0) return rho;
  const exponent = generator.map((x) => time * x);
  return timesTransposed(expmReal(exponent, rho.length), rho);
}

/** Lᵀx, L†ρ in coordinates. */
export function timesTransposed(m: Float64Array, x: Float64Array): Float64Array {
  const d = x.length;
  const out = new Float64Array(d);
  for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) out[j] += m[i * d + j] * x[i];
  return out;
}
