/**
 * f'(0) by Richardson extrapolation: central differences at 2m points ±h_k, h_k = r cos((2k+1)π/4m), taken to h = 0 as a
 * polynomial in h² (Neville). For f analytic within 4r the truncation is below 8^{−2m}, near 1e-14 for m = 8; rounding is
 * some m·2⁻⁵²·max|f|/r.
 */
export function derivativeAtZero(f: (t: number) => number, r: number, m = 8): number {
  const steps = Array.from({ length: m }, (_, k) => r * Math.cos(((2 * k + 1) * Math.PI) / (4 * m)));
  const table = steps.map((h) => (f(h) - f(-h)) / (2 * h));
  for (let width = 1; width < m; width++) {
    for (let k = 0; k + width < m; k++) {
      const [x, y] = [steps[k] ** 2, steps[k + width] ** 2];
      table[k] = (x * table[k + 1] - y * table[k]) / (x - y);
    }
  }
  return table[0];
}
