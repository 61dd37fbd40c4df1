import type { End, Grade } from '../sheet/bracket.js';

/**
 * A usable lower input: an end that is a bound, not an observation, and positive. Rules that only hold for positive
 * constants take their input through this.
 */
export function positiveBound(end: End | null): End | null {
  return end && end.grade !== 'observed' && end.value > 0 && Number.isFinite(end.value) ? end : null;
}

/** The grade of a bound computed in floating point from an input: certified at best. */
export function computedGrade(input: Grade): Grade {
  return input === 'observed' ? 'observed' : 'certified';
}

/** An end scaled by a positive number, its evidence left behind: it witnesses the input's inequality, not this one. */
export function scaledEnd(end: End, factor: number, by: string): End {
  return {
    value: end.value * factor,
    grade: computedGrade(end.grade),
    by,
    ...(end.margin === undefined ? {} : { margin: end.margin * factor }),
  };
}

/** An end that another inequality inherits unchanged, with its grade. */
export function inheritedEnd(end: End, by: string): End {
  return { value: end.value, grade: end.grade, by, ...(end.margin === undefined ? {} : { margin: end.margin }) };
}
