import { exp, expm1 } from './exponential.js';

/** Beyond, e^{−|x|} is below half a unit of the last place of e^{|x|}. */
const LARGE = 22;

/** (e^x − e^{−x})/2 (fdlibm's e_sinh.c, Sun Microsystems 1993). */
export function sinh(x: number): number {
  const half = x < 0 ? -0.5 : 0.5;
  const size = Math.abs(x);
  if (!(size > 3.725290298461914e-9)) return x;
  if (size < LARGE) {
    const t = expm1(size);
    return size < 1 ? half * (2 * t - (t * t) / (t + 1)) : half * (t + t / (t + 1));
  }
  return x < 0 ? -halfExp(size) : halfExp(size);
}

/** (e^x + e^{−x})/2 (fdlibm's e_cosh.c). */
export function cosh(x: number): number {
  const size = Math.abs(x);
  if (size < 0.34657359027997264) {
    const t = expm1(size);
    return 1 + (t * t) / (2 * (1 + t));
  }
  if (size < LARGE) {
    const t = exp(size);
    return 0.5 * t + 0.5 / t;
  }
  return halfExp(size);
}

/** sinh x / cosh x (fdlibm's s_tanh.c). */
export function tanh(x: number): number {
  const size = Math.abs(x);
  if (!(size > 3.725290298461914e-9)) return x;
  const z = size >= LARGE ? 1 : size >= 1 ? 1 - 2 / (expm1(2 * size) + 2) : fraction(expm1(-2 * size));
  return x < 0 ? -z : z;
}

function fraction(t: number): number {
  return -t / (t + 2);
}

/** e^size/2, also where e^size itself is no double. */
function halfExp(size: number): number {
  if (!(size > 709)) return 0.5 * exp(size);
  const w = exp(0.5 * size);
  return 0.5 * w * w;
}
