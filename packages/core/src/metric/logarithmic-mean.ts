import { CLOSE_ARGUMENTS, SERIES_PHI, SERIES_ARTANH } from '../tolerances.js';

/** Λ(x,y) = (x−y)/(log x − log y), Λ(x,x)=x, for x, y > 0; relative error a few units in the last place. */
export function logarithmicMean(x: number, y: number): number {
  const t = (x - y) / (x + y);
  if (Math.abs(t) > SERIES_ARTANH) return (x - y) / Math.log(x / y);
  const s = t * t;
  // artanh(t)/t = Σ t^{2k}/(2k+1); log x − log y = 2 artanh t.
  let sum = 0;
  for (let k = 9; k >= 0; k--) sum = sum * s + 1 / (2 * k + 1);
  return (x + y) / (2 * sum);
}

/** ∂Λ(x,y)/∂x = φ₂(−log(x/y)) with φ₂(z) = (e^z−1−z)/z². */
function logarithmicMeanSlope(x: number, y: number): number {
  const t = (x - y) / (x + y);
  const r = Math.abs(t) > SERIES_ARTANH ? Math.log(x / y) : 2 * Math.atanh(t);
  return phi2(-r);
}

/** (Λ(x1,y) − Λ(x2,y))/(x1 − x2), the slope at x1 when x1 = x2; no cancellation as the two meet. Known values save logarithms. */
export function logarithmicMeanDifference(x1: number, x2: number, y: number, value1?: number, value2?: number): number {
  if (x1 === x2) return logarithmicMeanSlope(x1, y);
  const width = x1 - x2;
  if (Math.abs(width) > CLOSE_ARGUMENTS * (x1 + x2)) {
    return ((value1 ?? logarithmicMean(x1, y)) - (value2 ?? logarithmicMean(x2, y))) / width;
  }
  // The mean of the slope over [x2, x1] by Gauss–Legendre quadrature (six points).
  const centre = (x1 + x2) / 2;
  const half = width / 2;
  let sum = 0;
  for (let k = 0; k < 3; k++) {
    sum +=
      GAUSS_WEIGHTS[k] *
      (logarithmicMeanSlope(centre + half * GAUSS_NODES[k], y) +
        logarithmicMeanSlope(centre - half * GAUSS_NODES[k], y));
  }
  return sum / 2;
}

function phi2(z: number): number {
  if (Math.abs(z) > SERIES_PHI) return (Math.expm1(z) - z) / (z * z);
  let sum = 0;
  for (let k = INVERSE_FACTORIALS.length - 1; k >= 0; k--) sum = sum * z + INVERSE_FACTORIALS[k];
  return sum;
}

/** 1/(k+2)! */
const INVERSE_FACTORIALS = Array.from({ length: 17 }, (_, k) => {
  let product = 1;
  for (let i = 2; i <= k + 2; i++) product *= i;
  return 1 / product;
});

/** Six-point Gauss–Legendre nodes and weights on [−1,1] (Abramowitz & Stegun 1964, table 25.4). */
const GAUSS_NODES = [0.2386191860831969, 0.6612093864662645, 0.932469514203152];
const GAUSS_WEIGHTS = [0.467913934572691, 0.3607615730481386, 0.1713244923791703];
