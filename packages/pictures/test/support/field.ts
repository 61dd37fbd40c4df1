import type { ReliefData, ReliefField } from '../../src/index.js';

/** A function on the unit disc at rings and rays. */
export function discField(kappa: (x: number, y: number) => number | null, rings = 24, rays = 72): ReliefField {
  const x: number[] = [];
  const y: number[] = [];
  for (let i = 0; i < rings; i++) {
    const radius = 0.9999 * (1 - (1 - i / (rings - 1)) ** 2);
    for (let j = 0; j < rays; j++) {
      x.push(radius * Math.cos((2 * Math.PI * j) / rays));
      y.push(radius * Math.sin((2 * Math.PI * j) / rays));
    }
  }
  const angles = Array.from({ length: 360 }, (_, k) => (2 * Math.PI * k) / 360);
  return {
    rings,
    rays,
    x,
    y,
    kappa: x.map((u, k) => kappa(u, y[k] ?? 0)),
    rimX: angles.map(Math.cos),
    rimY: angles.map(Math.sin),
  };
}

/** κ on the disc x, z of a made-up qubit, its lowest point at (0.2, −0.1). */
export function discRelief(
  kappa: (x: number, y: number) => number | null,
  change: Partial<ReliefData> = {},
): ReliefData {
  return {
    title: 'A qubit',
    mean: 'logarithmic',
    slice: { kind: 'bloch disc', axes: ['x', 'z'], marks: [] },
    grid: discField(kappa),
    lowest: { x: 0.2, y: -0.1, kappa: 0.75, atRim: false },
    reference: { x: 0, y: 0.4 },
    ...change,
  };
}
