import { ThalwegError } from '../errors.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import { requireFiniteNumber, requireRate } from './matrix-input.js';

/** Spectral function g of a bath, a rate at each Bohr frequency ω > 0 of emission, g(−ω) = e^{−βω} g(ω). */
export type BathSpectrum =
  /** g = strength / (1 + e^{−βω}) */
  | { readonly kind: 'flat'; readonly strength?: number }
  /** g = strength · ω e^{−|ω|/cutoff} / (1 − e^{−βω}), strength/β at 0 */
  | { readonly kind: 'ohmic'; readonly strength?: number; readonly cutoff: number }
  /** g = strength · min(1, e^{βω}) */
  | { readonly kind: 'metropolis'; readonly strength?: number }
  /** [ω, g(ω)]; where only one of ±ω is listed the other follows from detailed balance */
  | { readonly kind: 'table'; readonly values: readonly (readonly [number, number])[] };

const POINTER = '/generator/spectrum';

/**
 * g as a function, checked once: strengths and tabulated rates at least 0, a positive cutoff, detailed balance of a table.
 * `tolerance` is the distance within which a frequency is found in a table. The function throws `spectrum-not-balanced` at a
 * frequency that a table lacks.
 */
export function bathRate(spectrum: BathSpectrum, beta: number, tolerance: number): (w: number) => number {
  if (spectrum.kind === 'table') return tabulated(spectrum.values, beta, tolerance);
  const strength = spectrum.strength ?? 1;
  requireRate(strength, `${POINTER}/strength`, 'the strength');
  if (spectrum.kind === 'flat') return (w) => strength / (1 + Math.exp(-beta * w));
  if (spectrum.kind === 'metropolis') return (w) => strength * Math.min(1, Math.exp(beta * w));
  const { cutoff } = spectrum;
  requirePositive(cutoff, `${POINTER}/cutoff`, 'the cutoff');
  requirePositive(beta, '/generator/beta', 'the inverse temperature of an ohmic bath');
  return (w) => strength * Math.exp(-Math.abs(w) / cutoff) * thermalFactor(beta, w, tolerance);
}

/** ω/(1 − e^{−βω}), 1/β at 0. */
function thermalFactor(beta: number, w: number, tolerance: number): number {
  return Math.abs(w) <= tolerance ? 1 / beta : -w / Math.expm1(-beta * w);
}

function requirePositive(x: number, pointer: string, what: string): void {
  requireFiniteNumber(x, pointer, what);
  if (x > 0) return;
  throw new ThalwegError('usage', `expected ${what} to be positive, got ${x}; correct it`, { pointer });
}

function tabulated(
  values: readonly (readonly [number, number])[],
  beta: number,
  tolerance: number,
): (w: number) => number {
  const find = (w: number): number | undefined => values.find(([x]) => Math.abs(x - w) <= tolerance)?.[1];
  values.forEach(([w, g], k) => {
    requireFiniteNumber(w, `${POINTER}/values/${k}/0`, 'a frequency');
    requireRate(g, `${POINTER}/values/${k}/1`, 'a rate');
    const mirrored = find(-w);
    const expected = Math.exp(-beta * w) * g;
    if (mirrored === undefined || Math.abs(mirrored - expected) <= INPUT_TOLERANCE * Math.max(mirrored, expected))
      return;
    throw new ThalwegError(
      'spectrum-not-balanced',
      `expected g(−ω) = e^{−βω}g(ω) = ${expected} at ω = ${w}, got ${mirrored}; leave one of ±ω out to have it filled in`,
      { pointer: `${POINTER}/values/${k}`, details: { frequency: w, expected, got: mirrored } },
    );
  });
  return (w) => {
    const direct = find(w);
    if (direct !== undefined) return direct;
    const mirrored = find(-w);
    if (mirrored !== undefined) return Math.exp(beta * w) * mirrored;
    throw new ThalwegError(
      'spectrum-not-balanced',
      `expected the spectrum to list the Bohr frequency ${w} or its negative, got a table without it; add [${w}, g]`,
      { pointer: `${POINTER}/values`, details: { frequency: w } },
    );
  };
}
