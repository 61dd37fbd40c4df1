import { numberText } from '../svg/number-text.js';
import type { Levels } from './levels.js';
import type { ReliefData } from './relief-data.js';

/** What the slice is. */
export function sliceText({ slice }: ReliefData): string {
  const { kind, axes, marks } = slice;
  if (kind === 'bloch disc') {
    const other = ['x', 'y', 'z'].find((axis) => !axes.includes(axis)) ?? '';
    return `the disc of states with ${other} = 0 in the Bloch ball`;
  }
  if (kind === 'plane') return `the plane of states through σ, ${marks.map(({ name }) => name).join(' and ')}`;
  return marks.some(({ name }) => name.startsWith('|'))
    ? 'the states that commute with σ'
    : 'the probabilities on three points';
}

/** The key below the picture. */
export function reliefNotes(data: ReliefData, levels: Levels | null): string[] {
  const { lowest, reference, slice } = data;
  const notes: string[] = [];
  if (levels) {
    const index = numberText(5 * levels.step);
    const doubled = doubledText(levels);
    notes.push(`Contours every ${numberText(levels.step)}, heavier every ${index}${doubled}.`);
  }
  if (lowest) {
    const where = lowest.atRim ? ', still falling towards the rim' : '';
    notes.push(`▲ lowest κ met on this slice${where}: observed, no lower bound.`);
  }
  if (reference) notes.push('○ reference state σ.');
  if (slice.kind === 'plane') notes.push('Coordinates are distances ‖·‖_{2} from σ.');
  const missing = missingCount(data);
  if (missing > 0) notes.push(`No lines where κ is not resolved in double precision (${missing} states).`);
  notes.push('κ is defined on faithful states: lines end just before the rim.');
  return notes;
}

function doubledText({ doubledBelow, doubledAbove, evenFrom, evenTo, step }: Levels): string {
  const [low, high] = [numberText(evenFrom - step), numberText(evenTo + step)];
  const where = doubledBelow
    ? doubledAbove
      ? `below ${low} and above ${high}`
      : `below ${low}`
    : doubledAbove
      ? `above ${high}`
      : null;
  return where === null ? '' : `; ${where} the step doubles from line to line`;
}

/** The text alternative. */
export function describeRelief(data: ReliefData, levels: Levels | null): string {
  const { grid, lowest, reference } = data;
  const values = Array.from(grid.kappa).filter((value): value is number => value !== null && !Number.isNaN(value));
  const missing = missingCount(data);
  const highest = values.reduce((top, value) => Math.max(top, value), -Infinity);
  const place = ({ x, y }: { x: number; y: number }): string => `(${written(x)}, ${written(y)})`;
  return [
    `Values of κ over ${sliceText(data)}, at ${grid.rings} × ${grid.rays} states.`,
    lowest ? `The lowest is ${written(lowest.kappa)} at ${place(lowest)}${lowest.atRim ? ', at the rim' : ''}.` : '',
    levels ? `The highest is ${written(highest)}, next to the boundary of state space or inside it.` : '',
    levels || !lowest ? '' : 'κ is the same everywhere.',
    reference ? `The reference state lies at ${place(reference)}.` : '',
    missing > 0 ? `At ${missing} states κ is not defined or not resolved in double precision.` : '',
  ]
    .filter((text) => text !== '')
    .join(' ');
}

function written(value: number): string {
  return numberText(value, 6).replace(/\^\{([^}]*)\}/, '^$1');
}

function missingCount({ grid }: ReliefData): number {
  return Array.from(grid.kappa).filter((value) => value === null || Number.isNaN(value)).length;
}
