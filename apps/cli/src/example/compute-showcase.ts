import { FULL_SHEET, type ConventionName, type MeanName, type RowKey } from '@thalweg/core';
import type { ClaimDocument, ExamplePackage, ParameterPoint, SheetDocument } from '@thalweg/format';
import { generateModel, pointName } from '../input/read-model.js';
import type { ComputeLimits, Session } from '../session.js';
import { computeSheet } from '../sheet/compute-sheet.js';
import { claimsAt, showcasePoints } from './check-package.js';

/** How the sheets of a showcase are computed. */
export interface ShowcaseSettings {
  /** Null for the full sheet. Constants that are claimed are computed in any case. */
  readonly rows: readonly RowKey[] | null;
  readonly seed: number;
  readonly convention: ConventionName;
  readonly limits: ComputeLimits;
}

/** One point of a showcase, computed. */
export interface ShowcasePoint {
  readonly parameters: ParameterPoint;
  readonly claims: readonly ClaimDocument[];
  /** Whether the time limit cut the sheet short. */
  readonly cut: boolean;
  readonly sheet: SheetDocument;
}

/** Computes the sheet of every point of the showcase, by the settings that belong to the point. */
export async function computeShowcase(
  example: ExamplePackage,
  settingsOf: (point: ParameterPoint) => ShowcaseSettings,
  session: Session,
): Promise<ShowcasePoint[]> {
  const points: ShowcasePoint[] = [];
  for (const parameters of showcasePoints(example)) {
    const { rows, seed, convention, limits } = settingsOf(parameters);
    session.output.progress(`computing ${pointName(example.document, parameters)}`);
    const claims = await claimsAt(example, parameters, session);
    const source = await generateModel(example, parameters, session);
    const asked = withClaimed(rows ?? FULL_ROWS, claims);
    const { sheet, unfinished } = await computeSheet({ source, rows: asked, seed, convention, limits }, session);
    points.push({ parameters, claims, sheet, cut: unfinished !== null });
  }
  return points;
}

const DEFAULT_MEAN: MeanName = 'logarithmic';

const FULL_ROWS: readonly RowKey[] = FULL_SHEET.map(({ id }) => (id === 'ge' ? { id, mean: DEFAULT_MEAN } : { id }));

function withClaimed(rows: readonly RowKey[], claims: readonly ClaimDocument[]): RowKey[] {
  const claimed = claims.map(claimedRow);
  const missing = claimed.filter((row, k) => !contains(rows, row) && !contains(claimed.slice(0, k), row));
  return [...rows, ...missing];
}

/** The row of a sheet that a claim is about. */
export function claimedRow({ constant, mean }: ClaimDocument): RowKey {
  return constant === 'ge' ? { id: constant, mean: mean ?? DEFAULT_MEAN } : { id: constant };
}

function contains(rows: readonly RowKey[], { id, mean }: RowKey): boolean {
  return rows.some((row) => row.id === id && row.mean === mean);
}
