/** An eigenvalue with its multiplicity. */
export interface Cluster {
  readonly re: number;
  readonly im: number;
  readonly count: number;
}

/** Eigenvalues closer than this, relative to the largest, are one; such imaginary and real parts are zero. */
const CLOSE = 1e-7;

/** Equal eigenvalues together, by real part, then by imaginary part. */
export function clusterEigenvalues(eigenvalues: readonly (number | readonly [number, number])[]): Cluster[] {
  const values = eigenvalues.map((value): readonly [number, number] =>
    typeof value === 'number' ? [value, 0] : value,
  );
  const scale = Math.max(...values.map(([re, im]) => Math.hypot(re, im)), Number.MIN_VALUE);
  const clean = (x: number): number => (Math.abs(x) <= CLOSE * scale ? 0 : x);
  const out: { re: number; im: number; count: number }[] = [];
  for (const [re, im] of values.map(([a, b]) => [clean(a), clean(b)] as const).sort((a, b) => a[0] - b[0])) {
    const same = out.findLast((cluster) => Math.hypot(cluster.re - re, cluster.im - im) <= CLOSE * scale);
    if (same) same.count += 1;
    else out.push({ re, im, count: 1 });
  }
  return out.sort((a, b) => a.re - b.re || a.im - b.im);
}
