import type { ParameterPoint, SheetDocument, ShowcaseDocument } from '@thalweg/format';

/** The recorded sheet of a point, or null. */
export function recordedSheet({ points }: ShowcaseDocument, point: ParameterPoint): SheetDocument | null {
  return points.find(({ parameters }) => samePoint(parameters, point))?.sheet ?? null;
}

/** Whether two points have the same values of the same parameters. */
export function samePoint(a: ParameterPoint, b: ParameterPoint): boolean {
  return pointKey(a) === pointKey(b);
}

/** A text that equal points share, whatever the order of their parameters. */
export function pointKey(point: ParameterPoint): string {
  return JSON.stringify(Object.entries(point).sort(([a], [b]) => (a < b ? -1 : 1)));
}
