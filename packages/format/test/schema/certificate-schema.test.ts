import { describe, expect, it } from 'vitest';
import type { LiftCertificate } from '@thalweg/core';
import {
  CERTIFICATE_LIMITS,
  decodeCertificate,
  encodeCertificate,
  parseCertificate,
  parseDocument,
  parseEvidence,
  writeJson,
} from '../../src/index.js';
import { caughtError } from '../support/caught-error.js';

const DIGEST = 'a'.repeat(64);
const half = { numerator: 1n, denominator: 2n };
const certificate: LiftCertificate = {
  constant: 'cge',
  grade: 'exact',
  bound: { numerator: 1n, denominator: 1n },
  blocks: [2],
  state: [
    [0, 0, half, 0],
    [1, 1, half, 0],
  ],
  jumps: [{ label: 'Z', entries: [[0, 0, 1, 0], [1, 1, -1, 0]], rate: half, ratio: 1, partner: 0 }], // prettier-ignore
  lift: [{ left: -1, right: 0, from: 0, to: 0, re: 0.5, im: half }],
};
const document = encodeCertificate(certificate, DIGEST, { ansatz: 'diagonal', tool: { name: 'test', version: '1' } });

describe('a certificate document', () => {
  it('comes back as it was', () => {
    const text = writeJson(document);
    expect(parseCertificate(text)).toEqual(document);
    expect(parseDocument(text)).toEqual(document);
    expect(parseEvidence(text)).toEqual(document);
    expect(decodeCertificate(parseCertificate(text))).toEqual(certificate);
  });

  it('keeps the frame of an enclosed one', () => {
    const frame = [[0, 0, 0.6, 0], [0, 1, 0.8, 0], [1, 0, 0.8, 0], [1, 1, -0.6, 0]] as const; // prettier-ignore
    const turned: LiftCertificate = { ...certificate, grade: 'enclosed', frame };
    const text = writeJson(encodeCertificate(turned, DIGEST));
    expect(decodeCertificate(parseCertificate(text))).toEqual(turned);
  });

  it('writes rational numbers as text', () => {
    expect(document.bound).toBe('1');
    expect(document.state).toEqual([[0, 0, '1/2', 0], [1, 1, '1/2', 0]]); // prettier-ignore
  });

  const long = '7'.repeat(10_000_000);
  const cases: [string, object, string][] = [
    ['a text that is no number', { bound: 'NaN' }, '/bound'],
    ['infinity as text', { bound: 'Infinity' }, '/bound'],
    ['a decimal as text', { bound: '0.5' }, '/bound'],
    ['an integer of ten megabytes', { bound: long }, '/bound'],
    ['a denominator of ten megabytes', { lift: [[-1, -1, 0, 0, `1/${long}`, 0]] }, '/lift/0/4'],
    ['null', { bound: null }, '/bound'],
    ['an index below −1', { lift: [[-2, -1, 0, 0, 1, 0]] }, '/lift/0/0'],
    ['a broken index', { lift: [[-1, -1, 0.5, 0, 1, 0]] }, '/lift/0/2'],
    ['an entry of the wrong length', { state: [[0, 0, 1]] }, '/state/0'],
    ['no jumps', { jumps: [] }, '/jumps'],
    ['another constant', { constant: 'gap' }, '/constant'],
    ['the grade observed', { grade: 'observed' }, '/grade'],
    ['an unknown field', { proof: 1 }, '/proof'],
    ['no digest', { model: 'x' }, '/model'],
    ['too many terms', { lift: new Array(CERTIFICATE_LIMITS.terms + 1).fill(0) }, '/lift'],
  ];
  it.each(cases)('refuses %s', (_name, change, pointer) => {
    const started = performance.now();
    const error = caughtError(() => parseCertificate(JSON.stringify({ ...document, ...change })));
    expect(error.pointer).toBe(pointer);
    expect(error.message.length).toBeLessThan(400);
    expect(performance.now() - started).toBeLessThan(20_000);
  });

  it('refuses a denominator of 0 when decoded', () => {
    const zero = { ...document, bound: '1/0' };
    expect(caughtError(() => decodeCertificate(zero))).toMatchObject({ code: 'wrong-schema', pointer: '/bound' });
  });
});
