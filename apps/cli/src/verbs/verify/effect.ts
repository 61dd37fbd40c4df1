import { ThalwegError } from '@thalweg/core';
import { parseEvidence } from '@thalweg/format';
import { only } from '../../compute/only.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { inDocument } from '../../input/in-document.js';
import { readModel } from '../../input/read-model.js';
import { readSource } from '../../input/read-source.js';
import { renderCertificateVerdict } from '../../render/render-certificate-verdict.js';
import { renderVerdict } from '../../render/render-verdict.js';
import type { Session } from '../../session.js';
import type { VerifyPlan } from './plan.js';

/** Checks a witness or a certificate on its model. Ends with `no` when it does not show what it states. */
export async function verifyEffect(plan: VerifyPlan, session: Session): Promise<ExitStatus> {
  const { stdin } = session.terminal;
  const evidence = await readSource(plan.evidence, stdin);
  const document = inDocument(evidence.name, () => parseEvidence(evidence.bytes));
  if (plan.model === null) {
    throw new ThalwegError(
      'usage',
      `expected --model with the file of the model whose digest is ${document.model}, got none; evidence names its model by digest only`,
    );
  }
  const source = await readModel({ model: plan.model, set: plan.set }, session);
  const isCertificate = document.schema === 'thalweg.certificate/1';
  const verdict = await session.compute(plan, async (pool) =>
    only(
      isCertificate
        ? await pool.run('certificate-check', [{ source, document }])
        : await pool.run('witness-check', [{ source, document, name: evidence.name }]),
    ),
  );
  const { output } = session;
  if (output.json) output.document(verdict);
  else output.result((isCertificate ? renderCertificateVerdict : renderVerdict)(verdict, output));
  return verdict.claims.every(({ verdict: answer }) => answer === 'holds') ? EXIT_STATUS.yes : EXIT_STATUS.no;
}
