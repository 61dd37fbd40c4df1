import type { Scalar } from './scalar.js';

/** The constants that a lift bounds from below. */
export const CERTIFIED_CONSTANTS = ['cge', 'ge', 'clsi', 'mlsi'] as const;

export type CertifiedConstant = (typeof CERTIFIED_CONSTANTS)[number];

/** What a certificate can claim of itself, strongest first. */
export const CERTIFICATE_GRADES = ['exact', 'enclosed', 'certified'] as const;

export type CertificateGrade = (typeof CERTIFICATE_GRADES)[number];

/** An entry of a matrix: row, column, real and imaginary part. */
export type MatrixEntry = readonly [number, number, Scalar, Scalar];

/** A jump W of L(A) = Σ rate (W*AW − ½{W*W, A}) with σWσ⁻¹ = W/ratio; the V of §2 is √(rate·√ratio/2) W. */
export interface CertificateJump {
  readonly label?: string;
  readonly entries: readonly MatrixEntry[];
  readonly rate: Scalar;
  /** e^{ω}. */
  readonly ratio: Scalar;
  /** Index of the jump W*, whose rate is rate·ratio and whose ratio is 1/ratio. */
  readonly partner: number;
}

/** (L̂ζ)_to ∋ (re + i·im) W_left* ζ_from W_right for ζ_j = [W_j, A]; the index −1 stands for the identity. */
export interface CertificateTerm {
  readonly left: number;
  readonly right: number;
  readonly from: number;
  readonly to: number;
  readonly re: Scalar;
  readonly im: Scalar;
}

/**
 * A lift L̂ of L with the K for which it proves CGE(K) (§6 of the method): the terms above and −½(Sζ_k + ζ_kS),
 * S = Σ rate W*W.
 */
export interface LiftCertificate {
  readonly constant: CertifiedConstant;
  /**
   * `exact` claims that every condition holds in rational arithmetic; `enclosed` that all but the positivity of the forms do,
   * which is proved with intervals; `certified` that they hold up to rounding.
   */
  readonly grade: CertificateGrade;
  readonly bound: Scalar;
  /**
   * Entries of a nearly unitary matrix whose columns are the basis that everything below is written in; the unitary nearest to it is
   * meant. Left out where that is the basis of the model.
   */
  readonly frame?: readonly MatrixEntry[];
  readonly blocks: readonly number[];
  readonly state: readonly MatrixEntry[];
  readonly jumps: readonly CertificateJump[];
  readonly lift: readonly CertificateTerm[];
}

/** One condition of a certificate: a residual that must stay below its limit, or a margin that must stay above it. */
export interface Condition {
  readonly name: string;
  readonly holds: boolean;
  readonly kind: 'residual' | 'margin';
  readonly value: number;
  readonly limit: number;
  readonly note?: string;
}
