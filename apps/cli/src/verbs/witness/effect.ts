import { bestWitness, ThalwegError } from '@thalweg/core';
import { writeJson, type WitnessDocument } from '@thalweg/format';
import { only } from '../../compute/only.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { readSource } from '../../input/read-source.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import { renderWitness } from '../../render/render-witness.js';
import type { Session } from '../../session.js';
import { computeSheet } from '../../sheet/compute-sheet.js';
import type { WitnessPlan } from './plan.js';

/** Finds the best witness of a constant, or the one at a given state; prints it and writes it with -o. */
export async function witnessEffect(plan: WitnessPlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const witness = plan.at === null ? await searchedWitness(plan, session) : await witnessAt(plan, plan.at, session);
  if (plan.output !== null) await writeFileAtomically(plan.output, writeJson(witness));
  const { output } = session;
  if (output.json) output.document(witness);
  else output.result(renderWitness(witness, output));
  if (plan.output !== null)
    output.note(`wrote ${plan.output}; check it with: thalweg verify ${plan.output} --model ${plan.model}`);
  return EXIT_STATUS.yes;
}

async function witnessAt(plan: WitnessPlan, at: string, session: Session): Promise<WitnessDocument> {
  const { stdin } = session.terminal;
  const source = await readModel(plan, session);
  const state = await readSource(at, stdin);
  const { constant, mean } = plan;
  return session.compute(plan, async (pool) => only(await pool.run('witness-at', [{ source, state, constant, mean }])));
}

async function searchedWitness(plan: WitnessPlan, session: Session): Promise<WitnessDocument> {
  const { constant, mean, seed, convention, threads, timeLimit } = plan;
  const source = await readModel(plan, session);
  const rows = [constant === 'ge' ? { id: constant, mean } : { id: constant }];
  const job = { source, rows, seed, convention, limits: { threads, timeLimit }, searchClosed: true };
  const { sheet, findings } = await computeSheet(job, session);
  const found = bestWitness(findings, constant, mean);
  if (found !== null) {
    return session.compute(plan, async (pool) => only(await pool.run('witness-found', [{ source, witness: found }])));
  }
  const [row] = sheet.constants;
  const why = row?.note ?? (row?.upper ? `its upper end comes from: ${row.upper.by}` : 'nothing bounds it from above');
  throw new ThalwegError(
    'not-supported',
    `expected a witness for ${constant}, but there is none to show: ${why}; thalweg constants shows which constants are given`,
  );
}
