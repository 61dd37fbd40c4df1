import type { ConventionName } from '@thalweg/core';
import type { ExamplePackage, ReproductionDocument, SheetDocument } from '@thalweg/format';
import { compareSheets } from '../../example/compare-sheets.js';
import {
  claimedRow,
  computeShowcase,
  type ShowcasePoint,
  type ShowcaseSettings,
} from '../../example/compute-showcase.js';
import { decideExampleClaim } from '../../example/decide-example-claim.js';
import { recordShowcase, requireFolder } from '../../example/record-showcase.js';
import { recordedSheet } from '../../example/recorded-sheet.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readPackage } from '../../input/read-package.js';
import { renderReproduction } from '../../render/render-reproduction.js';
import type { Session } from '../../session.js';
import { rowKeys } from '../../sheet/row-keys.js';
import { TOOL } from '../../version.js';
import type { ReproducePlan } from './plan.js';

/** Computes the showcase of an example again and compares it with its record, or records it. */
export async function reproduceEffect(plan: ReproducePlan, session: Session): Promise<ExitStatus> {
  if (plan.record) await requireFolder(plan.example);
  const example = await readPackage(plan.example, session);
  const recorded = plan.record ? null : example.recorded;
  const points = await computeShowcase(
    example,
    (point) => settingsOf(recorded && recordedSheet(recorded, point), plan),
    session,
  );
  const found = plan.record ? await recordShowcase(plan.example, points, session) : recorded;
  const reproduction = reproductionOf({ ...example, recorded: found }, points);
  const { output } = session;
  if (output.json) output.document(reproduction);
  else output.result(renderReproduction(reproduction, output));
  if (points.some(({ cut }) => cut)) output.note('The time limit ended some searches early: brackets may be looser.');
  return STATUS[reproduction.verdict];
}

const STATUS = { same: EXIT_STATUS.yes, differs: EXIT_STATUS.no, undecided: EXIT_STATUS.undecided } as const;

/** What was recorded is computed as it was then; anything else as the options say. */
function settingsOf(recorded: SheetDocument | null, plan: ReproducePlan): ShowcaseSettings {
  const { only, threads, timeLimit } = plan;
  const limits = { threads, timeLimit };
  if (recorded === null) {
    const rows = only === null ? null : rowKeys({ only, mean: 'logarithmic' });
    return { rows, seed: plan.seed, convention: plan.convention, limits };
  }
  return {
    rows: recorded.constants.map(({ id, mean }) => (mean === undefined ? { id } : { id, mean })),
    seed: Number(recorded.seed),
    convention: recorded.convention as ConventionName,
    limits,
  };
}

function reproductionOf(
  { document, recorded }: ExamplePackage,
  computed: readonly ShowcasePoint[],
): ReproductionDocument {
  const points = computed.map(({ parameters, claims, sheet }) => {
    const before = recorded && recordedSheet(recorded, parameters);
    return {
      parameters,
      model: sheet.model.digest,
      recordedModel: before?.model.digest ?? null,
      differences: before === null ? [] : compareSheets(before, sheet),
      claims: claims.map((claim) => {
        const key = claimedRow(claim);
        const row = sheet.constants.find(({ id, mean }) => id === key.id && mean === key.mean);
        if (row === undefined) throw new Error(`no row for ${claim.constant}`);
        return decideExampleClaim(claim, row, sheet.convention as ConventionName);
      }),
    };
  });
  const { name, version } = document;
  return {
    schema: 'thalweg.reproduction/1',
    example: { name, version },
    verdict: verdictOf(points),
    points,
    tool: TOOL,
  };
}

/** What a better program may find: it confirms the record. */
const BETTER: ReadonlySet<string> = new Set(['tighter', 'stronger-grade']);

function verdictOf(points: ReproductionDocument['points']): ReproductionDocument['verdict'] {
  const contradicted = points.some(
    ({ model, recordedModel, differences, claims }) =>
      (recordedModel !== null && recordedModel !== model) ||
      differences.some(({ change }) => change === 'contradicts') ||
      claims.some(({ state }) => state === 'refuted'),
  );
  if (contradicted) return 'differs';
  const undecided = points.some(
    ({ recordedModel, differences, claims }) =>
      recordedModel === null ||
      differences.some(({ change }) => !BETTER.has(change)) ||
      claims.some(({ state }) => state === 'open'),
  );
  return undecided ? 'undecided' : 'same';
}
