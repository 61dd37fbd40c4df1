/** x −= Σ <v, x> v over orthonormal vectors, twice (Kahan & Parlett: twice is enough); returns the coefficients removed. */
export function orthogonalise(x: Float64Array, basis: readonly Float64Array[]): Float64Array {
  const removed = new Float64Array(basis.length);
  for (let pass = 0; pass < 2; pass++) {
    for (let k = 0; k < basis.length; k++) {
      const v = basis[k];
      let sum = 0;
      for (let i = 0; i < x.length; i++) sum += v[i] * x[i];
      removed[k] += sum;
      for (let i = 0; i < x.length; i++) x[i] -= sum * v[i];
    }
  }
  return removed;
}

/** Euclidean norm; sizes near the ends of the range of doubles do not occur among normalised vectors. */
export function norm(x: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i++) sum += x[i] * x[i];
  return Math.sqrt(sum);
}

/** Appends the direction of x orthogonal to the list, unless less than 1e-8 of x is left. */
export function appendOrthonormal(basis: Float64Array[], x: Float64Array): void {
  const size = norm(x);
  if (!(size > 0)) return;
  const rest = x.map((value) => value / size);
  orthogonalise(rest, basis);
  const left = norm(rest);
  if (left < 1e-8) return;
  basis.push(rest.map((value) => value / left));
}
