import type { ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { ratesGenerator } from '../../../src/generator/rates-generator.js';
import { type Structure, analyse } from '../../../src/structure/structure.js';
import { distribution } from './states.js';

/** n cells of [0,1] with jumps to neighbours at rate n²: the heat semigroup e^{tΔ}, reflected, or on the circle of length 1. */
export function heatFlow(n: number, isCircle: boolean): Structure {
  const isNext = (i: number, j: number): boolean => Math.abs(i - j) === 1 || (isCircle && Math.abs(i - j) === n - 1);
  return analyse(ratesGenerator(square(n, (i, j) => (isNext(i, j) ? n * n : 0))));
}

/** f'' − xf' on n points from −reach to reach: rates e^{−(V(y) − V(x))/2}/h², V = x²/2, reversible for e^{−V}. */
export function ornsteinUhlenbeck(n: number, reach: number): { readonly structure: Structure; readonly step: number } {
  const step = (2 * reach) / (n - 1);
  const at = (i: number): number => -reach + i * step;
  const rate = (i: number, j: number): number => Math.exp(-(at(j) ** 2 - at(i) ** 2) / 4) / step ** 2;
  return { structure: analyse(ratesGenerator(square(n, (i, j) => (Math.abs(i - j) === 1 ? rate(i, j) : 0)))), step };
}

/** A density on [0,1] through its distribution function. */
export interface Density {
  readonly cumulative: (x: number) => number;
  readonly value: (x: number) => number;
}

/** 1 + a cos(2πmx). */
export function wave(a: number, m: number): Density {
  const k = 2 * Math.PI * m;
  return { cumulative: (x) => x + (a * Math.sin(k * x)) / k, value: (x) => 1 + a * Math.cos(k * x) };
}

/** Its masses on n equal cells. */
export function cells({ cumulative }: Density, n: number): ComplexMatrix {
  return distribution(...Array.from({ length: n }, (_, i) => cumulative((i + 1) / n) - cumulative(i / n)));
}

/** W₂ to the uniform density on [0,1]: √∫(F⁻¹(u) − u)² du, by the midpoint rule and Newton's method for F⁻¹. */
export function distanceToUniform({ cumulative, value }: Density): number {
  const count = 20000;
  let sum = 0;
  let x = 0;
  for (let k = 0; k < count; k++) {
    const u = (k + 0.5) / count;
    for (let i = 0; i < 60; i++) {
      const step = (cumulative(x) - u) / value(x);
      x -= step;
      if (Math.abs(step) < 1e-14) break;
    }
    sum += (x - u) ** 2 / count;
  }
  return Math.sqrt(sum);
}

function square(n: number, entry: (i: number, j: number) => number): number[][] {
  return Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => entry(i, j)));
}
