import { ThalwegError } from '@thalweg/core';
import { fault, type Fault } from '../fault.js';
import { SPECTRUM_BALANCE_TOLERANCE, SPECTRUM_FREQUENCY_TOLERANCE } from '../tolerances.js';
import type { SpectrumDocument } from './model-document.js';

/**
 * The bath spectrum g of a Davies generator: rate at which the system loses the energy w to the bath, g(−w) = e^{−beta w} g(w).
 * A table knows its own frequencies and their negatives; any other one is refused with `spectrum-not-balanced`.
 */
export function bathSpectrum(spectrum: SpectrumDocument, beta: number): (w: number) => number {
  switch (spectrum.kind) {
    case 'flat':
      return (w) => spectrum.strength / (1 + Math.exp(-beta * w));
    case 'ohmic':
      return (w) => spectrum.strength * cutoffFactor(w, spectrum.cutoff) * thermalFactor(w, beta);
    case 'metropolis':
      return (w) => spectrum.strength * Math.min(1, Math.exp(beta * w));
    case 'table':
      return (w) => lookUp(spectrum.values, beta, w);
  }
}

/** The first fault of a tabulated spectrum: a frequency given twice, or two rates that violate detailed balance. */
export function findSpectrumFault({ spectrum, beta }: { spectrum: SpectrumDocument; beta: number }): Fault | null {
  if (spectrum.kind === 'ohmic' && beta === 0) {
    return fault(
      'not-finite',
      'expected beta above 0 with an ohmic spectrum, whose rates grow without bound at infinite temperature, got 0; choose "flat"',
      ['beta'],
    );
  }
  if (spectrum.kind !== 'table') return null;
  const rates = new Map<number, number>();
  for (const [k, [w, g]] of spectrum.values.entries()) {
    const path = ['spectrum', 'values', k];
    if (rates.has(w)) return fault('wrong-schema', `expected each frequency once, got ${w} again; remove one`, path);
    rates.set(w, g);
    const reverse = rates.get(-w);
    if (reverse === undefined) continue;
    const [lost, gained] = w > 0 ? [g, reverse] : [reverse, g];
    const balanced = Math.exp(-beta * Math.abs(w)) * lost;
    if (Math.abs(gained - balanced) <= SPECTRUM_BALANCE_TOLERANCE * Math.max(gained, balanced)) continue;
    const size = Math.abs(w);
    const message = `expected g(${-size}) = ${balanced} since g(-w) = exp(-beta w) g(w) and g(${size}) = ${lost}, got ${gained}; correct one of them or leave it out`;
    return fault('spectrum-not-balanced', message, path, { frequency: -size, expected: balanced, got: gained });
  }
  return null;
}

function cutoffFactor(w: number, cutoff: number | undefined): number {
  return cutoff === undefined ? 1 : Math.exp(-Math.abs(w) / cutoff);
}

/** w/(1 − e^{−beta w}), which tends to 1/beta as w → 0. */
function thermalFactor(w: number, beta: number): number {
  const x = beta * w;
  return x === 0 ? 1 / beta : -w / Math.expm1(-x);
}

function lookUp(values: readonly (readonly [number, number])[], beta: number, w: number): number {
  const width = Math.max(...values.map(([x]) => Math.abs(x)));
  const near = (x: number, y: number) => Math.abs(x - y) <= SPECTRUM_FREQUENCY_TOLERANCE * width;
  const direct = values.find(([x]) => near(x, w));
  if (direct) return direct[1];
  const reverse = values.find(([x]) => near(-x, w));
  if (reverse) return Math.exp(beta * w) * reverse[1];
  const message = `expected the table of the bath spectrum to hold every Bohr frequency, got none for ${w}; add [${w}, rate]`;
  throw new ThalwegError('spectrum-not-balanced', message, {
    pointer: '/generator/spectrum/values',
    details: { frequency: w },
  });
}
