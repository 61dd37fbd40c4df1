import { writeJson } from '@thalweg/format';
import { only } from '../../compute/only.js';
import type { CertifyOutcome } from '../../compute/tasks/certificate-tasks.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import type { DocumentSource } from '../../input/read-source.js';
import type { Output } from '../../output/output.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import { renderCertificateVerdict } from '../../render/render-certificate-verdict.js';
import type { Session } from '../../session.js';
import type { CertifyPlan } from './plan.js';

/** Makes a certificate, checks it and writes it. Ends with `undecided` when none is found that passes. */
export async function certifyEffect(plan: CertifyPlan, session: Session): Promise<ExitStatus> {
  const { model, constant, verbose, output: file } = plan;
  if (file !== null) await requireTarget(file);
  const source = await readModel(plan, session);
  const { output } = session;
  const found = await climb(source, plan, session);
  if (verbose) for (const line of found.iterates) output.note(line);
  const { certificate, verdict } = found;
  if (certificate === null || verdict === null) {
    output.note(`thalweg: no certificate for ${constant}: ${reasonOf(found)}`);
    return EXIT_STATUS.undecided;
  }
  if (file !== null) await writeFileAtomically(file, writeJson(certificate));
  if (output.json) output.document(certificate);
  else output.result(renderCertificateVerdict(verdict, output));
  tellMore(found, output);
  if (file !== null) output.note(`wrote ${file}; check it with: thalweg verify ${file} --model ${model}`);
  return EXIT_STATUS.yes;
}

/** The small ansatz first; the full one if that leaves a gap, and the better of the two. */
async function climb(source: DocumentSource, plan: CertifyPlan, session: Session): Promise<CertifyOutcome> {
  const { constant, timeLimit } = plan;
  const deadline = timeLimit === null ? null : Date.now() + timeLimit;
  return session.compute(plan, async (pool) => {
    session.output.progress('diagonal lifts');
    const small = only(await pool.run('certify', [{ source, constant, ansatz: 'diagonal', deadline }]));
    if (small.reason === 'closed') return small;
    session.output.progress('full lifts');
    const [full] = await pool.run('certify', [{ source, constant, ansatz: 'full', deadline }]);
    return full?.done ? better(small, full.result) : { ...small, reason: 'stopped' };
  });
}

function better(small: CertifyOutcome, full: CertifyOutcome): CertifyOutcome {
  const found = boundOf(small) > boundOf(full) ? small : full;
  return { ...found, reason: full.reason, iterates: [...small.iterates, ...full.iterates] };
}

function boundOf({ verdict }: CertifyOutcome): number {
  return verdict?.claims[0]?.bracket.lower?.value ?? -Infinity;
}

function tellMore({ reason, note }: CertifyOutcome, output: Output): void {
  if (reason === 'stopped') output.note('The time limit ended the search: more time may prove more.');
  else if (note !== null) output.note(note);
}

function reasonOf({ reason, note }: CertifyOutcome): string {
  const stopped = reason === 'stopped' ? 'the time limit ended the search' : null;
  return [note, stopped].filter((part) => part !== null).join('; ');
}
