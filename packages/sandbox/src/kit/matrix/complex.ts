import { requireFinite } from '../require.js';

export interface Complex {
  readonly re: number;
  readonly im: number;
}

/** A number, or a complex number as {re, im}. */
export type Scalar = number | Complex;

/** The complex number re + i im. */
export function complex(re: number, im = 0): Complex {
  requireFinite(re, 'the real part');
  requireFinite(im, 'the imaginary part');
  return { re, im };
}

/** Real and imaginary part of a scalar. */
export function partsOf(z: Scalar): Complex {
  return typeof z === 'number' ? complex(z) : complex(z?.re, z?.im);
}
