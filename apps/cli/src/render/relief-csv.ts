import type { ReliefDocument } from '@thalweg/format';

/** Every value of a relief as comma-separated values (RFC 4180, lines ended by LF), the centre once; empty where κ is not defined. */
export function reliefCsv({ grid: { rings, rays, x, y, kappa } }: ReliefDocument): string {
  const lines = ['x,y,kappa'];
  for (let i = 0; i < rings; i++) {
    for (let j = 0; j < (i === 0 ? 1 : rays); j++) {
      const k = i * rays + j;
      lines.push(`${x[k]},${y[k]},${kappa[k] ?? ''}`);
    }
  }
  return `${lines.join('\n')}\n`;
}
