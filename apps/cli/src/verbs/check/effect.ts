import type { RowKey } from '@thalweg/core';
import type { ConstantDocument, VerdictDocument } from '@thalweg/format';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { renderVerdict } from '../../render/render-verdict.js';
import type { Session } from '../../session.js';
import { computeSheet, unfinishedNote } from '../../sheet/compute-sheet.js';
import { decideClaim } from './decide.js';
import type { CheckPlan } from './plan.js';

/** Rounding allowed to a claim, relative to the larger of 1 and its bound; printed with the answer. */
const CLAIM_SLACK = 1e-9;

/** Decides claims about a model: all hold, one is refuted, or undecided. */
export async function checkEffect(plan: CheckPlan, session: Session): Promise<ExitStatus> {
  const source = await readModel(plan, session);
  const { seed, convention, threads, timeLimit, claims, mean } = plan;
  const keys = claims.map(({ constant }): RowKey =>
    constant.id === 'ge' ? { id: 'ge', mean: constant.mean ?? mean } : { id: constant.id },
  );
  const job = { source, rows: distinct(keys), seed, convention, limits: { threads, timeLimit } };
  const { sheet, unfinished } = await computeSheet(job, session);
  const verdict: VerdictDocument = {
    schema: 'thalweg.verdict/1',
    verb: 'check',
    model: sheet.model.digest,
    convention,
    claims: claims.map((claim, k) => decideClaim(claim, rowOf(sheet.constants, keys[k]), CLAIM_SLACK)),
    seed,
    tool: sheet.tool,
  };
  const { output } = session;
  if (output.json) output.document(verdict);
  else output.result(renderVerdict(verdict, output));
  if (unfinished !== null) output.note(unfinishedNote(unfinished, 'more time may decide more'));
  return statusOf(verdict);
}

function statusOf({ claims }: VerdictDocument): ExitStatus {
  if (claims.some(({ verdict }) => verdict === 'refuted')) return EXIT_STATUS.no;
  return claims.every(({ verdict }) => verdict === 'holds') ? EXIT_STATUS.yes : EXIT_STATUS.undecided;
}

function rowOf(rows: readonly ConstantDocument[], key: RowKey | undefined): ConstantDocument {
  const found = rows.find(({ id, mean }) => id === key?.id && mean === key.mean);
  if (found === undefined) throw new Error(`no row for ${key?.id ?? 'a claim'}`);
  return found;
}

function distinct(keys: readonly RowKey[]): RowKey[] {
  return [...new Map(keys.map((key) => [`${key.id}:${key.mean ?? ''}`, key])).values()];
}
