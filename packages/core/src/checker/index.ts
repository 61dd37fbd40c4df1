export {
  CERTIFICATE_GRADES,
  CERTIFIED_CONSTANTS,
  type CertificateGrade,
  type CertificateJump,
  type CertificateTerm,
  type CertifiedConstant,
  type Condition,
  type LiftCertificate,
  type MatrixEntry,
} from './lift-certificate.js';
export { checkCertificate, type CertificateVerdict } from './check-certificate.js';
export { doubleOf, type Scalar } from './scalar.js';
export { parseRational, printRational } from './arithmetic/rational-text.js';
export { type Rational } from './arithmetic/rational.js';
