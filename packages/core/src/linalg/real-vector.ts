/** Σ x_i y_i, summed in order. */
export function dot(x: Float64Array, y: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i++) sum += x[i] * y[i];
  return sum;
}

/** Euclidean norm, without care for squares that leave the range of doubles. */
export function norm(x: Float64Array): number {
  return Math.sqrt(dot(x, x));
}
