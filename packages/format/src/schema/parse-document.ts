import type { z } from 'zod';
import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';
import { parseJson } from '../json/parse-json.js';
import { requireDepth } from '../json/require-depth.js';
import { valueAt } from '../json/value-at.js';
import { claimsSchema, type ClaimDocument } from '../example/claims-schema.js';
import { exampleSchema, type ExampleDocument } from '../example/example-schema.js';
import { reproductionSchema, type ReproductionDocument } from '../example/reproduction-schema.js';
import { showcaseSchema, type ShowcaseDocument } from '../example/showcase-schema.js';
import { pointSchema, sweepSchema, type PointDocument, type SweepDocument } from '../example/sweep-schema.js';
import type { MatrixDocument } from '../matrix/matrix-document.js';
import type { ModelDocument } from '../model/model-document.js';
import { certificateSchema, type CertificateDocument } from './certificate-schema.js';
import { checkDocument } from './check-document.js';
import { comparisonSchema, type ComparisonDocument } from './comparison-schema.js';
import { distanceSchema, type DistanceDocument } from './distance-schema.js';
import { flowSchema, type FlowDocument } from './flow-schema.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSchema } from './model-schema.js';
import { reliefSchema, type ReliefDocument } from './relief-schema.js';
import { reportSchema, type ReportDocument } from './report-schema.js';
import { sheetSchema, type SheetDocument } from './sheet-schema.js';
import { stateSchema, type StateDocument } from './state-schema.js';
import { verdictSchema, type VerdictDocument } from './verdict-schema.js';
import { witnessSchema, type WitnessDocument } from './witness-schema.js';

/** Text or UTF-8 bytes of a document. */
export type Source = string | Uint8Array;

/** Every document of this package, told apart by `schema`. */
export type AnyDocument =
  | ModelDocument
  | SheetDocument
  | ReportDocument
  | WitnessDocument
  | CertificateDocument
  | VerdictDocument
  | ComparisonDocument
  | DistanceDocument
  | FlowDocument
  | ReliefDocument
  | StateDocument
  | ExampleDocument
  | ShowcaseDocument
  | SweepDocument
  | PointDocument
  | ReproductionDocument;

const SCHEMAS: Record<AnyDocument['schema'], z.ZodType<AnyDocument>> = {
  'thalweg.model/1': modelSchema,
  'thalweg.sheet/1': sheetSchema,
  'thalweg.report/1': reportSchema,
  'thalweg.witness/1': witnessSchema,
  'thalweg.certificate/1': certificateSchema,
  'thalweg.verdict/1': verdictSchema,
  'thalweg.comparison/1': comparisonSchema,
  'thalweg.distance/1': distanceSchema,
  'thalweg.flow/1': flowSchema,
  'thalweg.relief/1': reliefSchema,
  'thalweg.state/1': stateSchema,
  'thalweg.example/1': exampleSchema,
  'thalweg.showcase/1': showcaseSchema,
  'thalweg.sweep/1': sweepSchema,
  'thalweg.point/1': pointSchema,
  'thalweg.reproduction/1': reproductionSchema,
};

/** Reads a document of any schema. All `parse…` functions throw the errors of `parseJson` and of `checkDocument`. */
export function parseDocument(source: Source): AnyDocument {
  const value = parseJson(source);
  const name = valueAt(value, ['schema']);
  if (typeof name === 'string' && Object.hasOwn(SCHEMAS, name)) {
    return checkDocument(SCHEMAS[name as AnyDocument['schema']], value);
  }
  const known = Object.keys(SCHEMAS).join(', ');
  const message = `expected a document whose "schema" is one of ${known}, got ${describeValue(name)}; correct it`;
  throw new ThalwegError('wrong-schema', message, { pointer: '/schema' });
}

export function parseModel(source: Source): ModelDocument {
  return checkDocument(modelSchema, parseJson(source));
}

/** A model that is already a value, for example what an example's generator returned. */
export function checkModel(value: unknown): ModelDocument {
  requireDepth(value);
  return checkDocument(modelSchema, value);
}

/** What an example's generator states about its models; see `ClaimDocument`. */
export function parseClaims(source: Source): ClaimDocument[] {
  return checkDocument(claimsSchema, parseJson(source));
}

export function parseExample(source: Source): ExampleDocument {
  return checkDocument(exampleSchema, parseJson(source));
}

export function parseShowcase(source: Source): ShowcaseDocument {
  return checkDocument(showcaseSchema, parseJson(source));
}

export function parseSweep(source: Source): SweepDocument {
  return checkDocument(sweepSchema, parseJson(source));
}

export function parsePoint(source: Source): PointDocument {
  return checkDocument(pointSchema, parseJson(source));
}

/** A state: a `thalweg.state/1` document or a bare matrix. */
export function parseState(source: Source): MatrixDocument {
  const value = parseJson(source);
  if (valueAt(value, ['schema']) === undefined) return checkDocument(matrixSchema, value);
  return checkDocument(stateSchema, value).matrix;
}

export function parseWitness(source: Source): WitnessDocument {
  return checkDocument(witnessSchema, parseJson(source));
}

export function parseCertificate(source: Source): CertificateDocument {
  return checkDocument(certificateSchema, parseJson(source));
}

/** What `verify` takes: a witness or a certificate. */
export function parseEvidence(source: Source): WitnessDocument | CertificateDocument {
  const value = parseJson(source);
  const isCertificate = valueAt(value, ['schema']) === 'thalweg.certificate/1';
  return isCertificate ? checkDocument(certificateSchema, value) : checkDocument(witnessSchema, value);
}

export function parseSheet(source: Source): SheetDocument {
  return checkDocument(sheetSchema, parseJson(source));
}

export function parseReport(source: Source): ReportDocument {
  return checkDocument(reportSchema, parseJson(source));
}

export function parseVerdict(source: Source): VerdictDocument {
  return checkDocument(verdictSchema, parseJson(source));
}
