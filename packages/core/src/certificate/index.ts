export {
  certificateOf,
  makeCertificate,
  type CertificateResult,
  type CertifyOptions,
  type MadeCertificate,
} from './make-certificate.js';
