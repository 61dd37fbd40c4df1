import {
  checkCertificate,
  doubleOf,
  makeCertificate,
  printRational,
  ThalwegError,
  type CertificateVerdict,
  type CertifiedConstant,
  type Condition,
  type LiftAnsatz,
  type LiftCertificate,
} from '@thalweg/core';
import {
  decodeCertificate,
  encodeCertificate,
  type CertificateDocument,
  type EndDocument,
  type VerdictDocument,
} from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { iterateLine } from '../../render/iterate-line.js';
import { TOOL } from '../../version.js';
import type { TaskContext } from '../protocol.js';
import { markovModel, readModel } from './model-cache.js';

/** What `certify` found. */
export interface CertifyOutcome {
  /** Null when there is none that passes the checker. */
  readonly certificate: CertificateDocument | null;
  readonly verdict: VerdictDocument | null;
  readonly reason: 'closed' | 'exhausted' | 'stopped';
  readonly note: string | null;
  /** One line an iteration of the solver. */
  readonly iterates: readonly string[];
}

/** What `certify` asks for: one ansatz at a time, so that a large one can be cut off without losing the result of a small one. */
export interface CertifyRequest {
  readonly source: DocumentSource;
  readonly constant: CertifiedConstant;
  readonly ansatz: LiftAnsatz;
  /** Milliseconds since 1970 after which no iteration is begun; null for no limit. */
  readonly deadline: number | null;
}

/** Find, write down and check a certificate. */
export function makeCertificateDocument(
  { source, constant, ansatz, deadline }: CertifyRequest,
  context: TaskContext,
): CertifyOutcome {
  const { structure, digest } = markovModel(source);
  const iterates: string[] = [];
  const { made, reason, note } = makeCertificate(structure, constant, {
    ansatz,
    stop: () => context.isOutOfTime() || (deadline !== null && Date.now() >= deadline),
    onIterate: (record) => {
      const line = iterateLine(record);
      iterates.push(line);
      context.progress(line);
    },
  });
  if (!made) return { certificate: null, verdict: null, reason, note, iterates };
  const { certificate, verdict, rung, solver } = made;
  const document = encodeCertificate(certificate, digest, {
    ansatz: rung.ansatz,
    basis: rung.basis,
    solver,
    margins: Object.fromEntries(verdict.conditions.map(({ name, value }) => [name, value])),
    tool: TOOL,
  });
  return { certificate: document, verdict: verdictDocument(verdict, certificate, digest), reason, note, iterates };
}

/** Check a certificate against its model, independently of how it was found. */
export function checkCertificateDocument({
  source,
  document,
}: {
  readonly source: DocumentSource;
  readonly document: CertificateDocument;
}): VerdictDocument {
  const { generator, digest } = readModel(source);
  if (document.model !== digest) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected the model with digest ${document.model}, got ${digest}; the certificate belongs to another model`,
      { pointer: '/model' },
    );
  }
  const certificate = decodeCertificate(document);
  return verdictDocument(checkCertificate(generator, certificate), certificate, digest);
}

function verdictDocument(verdict: CertificateVerdict, certificate: LiftCertificate, digest: string): VerdictDocument {
  const failed = verdict.conditions.find(({ holds }) => !holds);
  const note = noteOf(verdict, failed);
  const { constant } = certificate;
  return {
    schema: 'thalweg.verdict/1',
    verb: 'verify',
    model: digest,
    claims: [
      {
        constant,
        ...(constant === 'ge' && { mean: 'logarithmic' as const }),
        relation: 'at-least',
        value: doubleOf(certificate.bound),
        verdict: failed ? 'undecided' : 'holds',
        bracket: { lower: lowerEnd(verdict), upper: null },
        ...(note !== undefined && { note }),
      },
    ],
    checks: verdict.conditions.map(({ name, holds, kind, value, limit, note }) => ({
      name,
      holds,
      ...(Number.isFinite(value) && { value }),
      bound: limit,
      relation: kind === 'residual' ? ('at-most' as const) : ('at-least' as const),
      ...(note !== undefined && { note }),
    })),
    tool: TOOL,
  };
}

/** The bound that is proved; null where none is. */
function lowerEnd({ holds, grade, bound, allowance }: CertificateVerdict): EndDocument | null {
  if (!holds || grade === null) return null;
  return { value: bound, grade, by: 'lift of ∂, checked', ...(allowance > 0 && { margin: allowance }) };
}

/** The condition that fails, or how a bound that holds is written exactly. */
function noteOf({ exactBound }: CertificateVerdict, failed: Condition | undefined): string | undefined {
  if (failed)
    return `the certificate proves nothing, this fails: ${failed.name}${failed.note ? ` (${failed.note})` : ''}`;
  return exactBound === null ? undefined : `exactly ${printRational(exactBound)}`;
}
