export { isArchive, readArchive } from './archive/read-archive.js';
export { packArchive, type PackageFiles } from './archive/pack-archive.js';
export { canonicalChunks } from './digest/canonical-chunks.js';
export { digestModel } from './digest/digest-model.js';
export { createSha256, sha256Hex, type RunningHash } from './digest/sha256.js';
export { type ClaimDocument } from './example/claims-schema.js';
export { EXAMPLE_FILES, SHOWCASE_FILE, readExample, type ExamplePackage } from './example/example-package.js';
export { type ExampleDocument } from './example/example-schema.js';
export { isLicence } from './example/licence.js';
export { isOrcid } from './example/orcid.js';
export { isVersion, versionParts } from './example/version.js';
export {
  completePoint,
  readParameterValue,
  unknownName,
  type ParameterPoint,
  type ParameterValue,
} from './example/parameter-point.js';
export { type Parameter } from './example/parameter-schema.js';
export { type ReproductionDocument } from './example/reproduction-schema.js';
export { type ShowcaseDocument } from './example/showcase-schema.js';
export { type PointDocument, type SweepDocument } from './example/sweep-schema.js';
export { canonicalJson } from './json/canonical-json.js';
export { jsonPointer, type PathSegment } from './json/json-pointer.js';
export { type JsonValue } from './json/json-value.js';
export { parseJson } from './json/parse-json.js';
export { writeJson } from './json/write-json.js';
export {
  ARCHIVE_LIMITS,
  FILE_BYTES_LIMIT,
  CERTIFICATE_LIMITS,
  JSON_LIMITS,
  LIST_LIMIT,
  MATRIX_LIMITS,
  type JsonLimits,
  type MatrixLimits,
} from './limits.js';
export {
  decodeMatrix,
  isSparse,
  toDense,
  toSparse,
  type DecodedMatrix,
  type DecodeOptions,
} from './matrix/decode-matrix.js';
export { encodeMatrix } from './matrix/encode-matrix.js';
export { type ReadFile } from './matrix/file-form.js';
export * from './matrix/matrix-document.js';
export { buildGenerator } from './model/build-generator.js';
export { loadModel, type LoadedModel } from './model/load-model.js';
export * from './model/model-document.js';
export { denseModel, resolveModel, type ResolvedModel, type ResolveOptions } from './model/resolve-model.js';
export { readMtx } from './mtx/read-mtx.js';
export { readNpy } from './npy/read-npy.js';
export * from './schema/parse-document.js';
export { certificateSchema, type CertificateDocument } from './schema/certificate-schema.js';
export { comparisonSchema, type ComparisonDocument } from './schema/comparison-schema.js';
export { distanceSchema, type DistanceDocument } from './schema/distance-schema.js';
export { flowSchema, type FlowDocument } from './schema/flow-schema.js';
export { matrixSchema } from './schema/matrix-schema.js';
export { modelSchema } from './schema/model-schema.js';
export { reliefSchema, type ReliefDocument } from './schema/relief-schema.js';
export { reportSchema, type ReportDocument } from './schema/report-schema.js';
export { sheetSchema, type ConstantDocument, type SheetDocument } from './schema/sheet-schema.js';
export { stateSchema, type StateDocument } from './schema/state-schema.js';
export { verdictSchema, type VerdictDocument } from './schema/verdict-schema.js';
export { witnessSchema, type WitnessDocument } from './schema/witness-schema.js';
export { type EndDocument } from './schema/end-schema.js';
export { encodeBracket, encodeEnd } from './encode/encode-end.js';
export { endValue } from './encode/end-value.js';
export { decodeCertificate, encodeCertificate } from './encode/encode-certificate.js';
export { decodeWitness, encodeWitness } from './encode/encode-witness.js';
