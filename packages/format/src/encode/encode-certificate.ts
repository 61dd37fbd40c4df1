import { type LiftCertificate, type MatrixEntry, type Scalar, parseRational, printRational } from '@thalweg/core';
import type { CertificateDocument } from '../schema/certificate-schema.js';

type ScalarText = CertificateDocument['bound'];
type Record = Pick<CertificateDocument, 'ansatz' | 'basis' | 'solver' | 'margins' | 'tool'>;

/** A certificate as a document of its own, for the model of the given digest; rational numbers become text. */
export function encodeCertificate(
  certificate: LiftCertificate,
  model: string,
  record: Record = {},
): CertificateDocument {
  const { constant, bound, grade, blocks, frame, state, jumps, lift } = certificate;
  return {
    schema: 'thalweg.certificate/1',
    model,
    constant,
    bound: encodeScalar(bound),
    grade,
    algebra: [...blocks],
    ...(frame !== undefined && { frame: frame.map(encodeEntry) }),
    state: state.map(encodeEntry),
    jumps: jumps.map(({ label, entries, rate, ratio, partner }) => ({
      ...(label !== undefined && { label }),
      matrix: entries.map(encodeEntry),
      rate: encodeScalar(rate),
      ratio: encodeScalar(ratio),
      partner,
    })),
    lift: lift.map(({ left, right, from, to, re, im }) => [left, right, from, to, encodeScalar(re), encodeScalar(im)]),
    ...record,
  };
}

/** The certificate of a document; throws `wrong-schema` or `too-large` with a pointer for a bad rational number. */
export function decodeCertificate(document: CertificateDocument): LiftCertificate {
  const { constant, bound, grade, algebra, frame, state, jumps, lift } = document;
  return {
    constant,
    grade,
    bound: decodeScalar(bound, '/bound'),
    blocks: algebra,
    ...(frame !== undefined && { frame: frame.map((entry, k) => decodeEntry(entry, `/frame/${k}`)) }),
    state: state.map((entry, k) => decodeEntry(entry, `/state/${k}`)),
    jumps: jumps.map(({ label, matrix, rate, ratio, partner }, j) => ({
      ...(label !== undefined && { label }),
      entries: matrix.map((entry, k) => decodeEntry(entry, `/jumps/${j}/matrix/${k}`)),
      rate: decodeScalar(rate, `/jumps/${j}/rate`),
      ratio: decodeScalar(ratio, `/jumps/${j}/ratio`),
      partner,
    })),
    lift: lift.map(([left, right, from, to, re, im], t) => ({
      left,
      right,
      from,
      to,
      re: decodeScalar(re, `/lift/${t}/4`),
      im: decodeScalar(im, `/lift/${t}/5`),
    })),
  };
}

function encodeScalar(x: Scalar): ScalarText {
  return typeof x === 'number' ? x + 0 : printRational(x);
}

function decodeScalar(x: ScalarText, pointer: string): Scalar {
  return typeof x === 'number' ? x : parseRational(x, pointer);
}

function encodeEntry([i, j, re, im]: MatrixEntry): [number, number, ScalarText, ScalarText] {
  return [i, j, encodeScalar(re), encodeScalar(im)];
}

function decodeEntry([i, j, re, im]: CertificateDocument['state'][number], pointer: string): MatrixEntry {
  return [i, j, decodeScalar(re, `${pointer}/2`), decodeScalar(im, `${pointer}/3`)];
}
