import { ThalwegError } from '../errors.js';
import type { ConstantId } from '../sheet/bracket.js';

export const CONVENTION_NAMES = ['two-alpha', 'four-alpha', 'one-alpha'] as const;

export type ConventionName = (typeof CONVENTION_NAMES)[number];

/** How papers normalise the entropy constants; everything is computed in `two-alpha` and converted for print. */
export interface Convention {
  readonly name: ConventionName;
  /** The inequality that gives the convention its name, with its relation to the gap λ. */
  readonly summary: string;
  /** Value in this convention divided by the value in `two-alpha`, for mlsi, clsi and lsi; other constants do not change. */
  readonly factor: number;
}

/** The convention of a name. Throws `usage` for an unknown one, naming those there are. */
export function conventionOf(name: string): Convention {
  const found = CONVENTIONS.find((convention) => convention.name === name);
  if (found) return found;
  throw new ThalwegError(
    'usage',
    `expected a convention for entropy constants among ${CONVENTION_NAMES.join(', ')}, got "${name}"`,
    { details: { conventions: [...CONVENTION_NAMES] } },
  );
}

/** A value computed here (`two-alpha`), in another convention. */
export function convert(value: number, constant: ConstantId, convention: ConventionName): number {
  return isEntropyConstant(constant) ? value * conventionOf(convention).factor : value;
}

/** The defining inequality of a constant in a convention, one line of plain text. */
export function definitionOf(constant: ConstantId, convention: ConventionName = 'two-alpha'): string {
  const { name } = conventionOf(convention);
  return isEntropyConstant(constant) ? ENTROPY_DEFINITIONS[constant][name] : DEFINITIONS[constant];
}

const CONVENTIONS: readonly Convention[] = [
  { name: 'two-alpha', summary: 'I ≥ 2αD, so D decays as e^{-2αt} and α ≤ λ', factor: 1 },
  { name: 'four-alpha', summary: 'I ≥ 4αD, so D decays as e^{-4αt} and α ≤ λ/2', factor: 0.5 },
  { name: 'one-alpha', summary: 'I ≥ αD, so D decays as e^{-αt} and α ≤ 2λ', factor: 2 },
];

type EntropyConstant = 'mlsi' | 'clsi' | 'lsi';

function isEntropyConstant(constant: ConstantId): constant is EntropyConstant {
  return constant === 'mlsi' || constant === 'clsi' || constant === 'lsi';
}

const MULTIPLES: Record<ConventionName, string> = { 'two-alpha': '2α', 'four-alpha': '4α', 'one-alpha': 'α' };

const ENERGY_MULTIPLES: Record<ConventionName, string> = {
  'two-alpha': '(α/2)',
  'four-alpha': 'α',
  'one-alpha': '(α/4)',
};

const ENTROPY_DEFINITIONS: Record<EntropyConstant, Record<ConventionName, string>> = {
  mlsi: inEach(
    (name) => `largest α with I(ρ) ≥ ${MULTIPLES[name]} D(ρ‖E†ρ) for all states ρ, I(ρ) = −Tr L†ρ(log ρ − log σ)`,
  ),
  clsi: inEach(
    (name) => `largest α with I(ρ) ≥ ${MULTIPLES[name]} D(ρ‖E†ρ) for L⊗id_k and all states ρ of M⊗M_k, every k`,
  ),
  lsi: inEach(
    (name) =>
      `largest α with −Tr σ^{1/2}Xσ^{1/2}L(X) ≥ ${ENERGY_MULTIPLES[name]} D(ρ‖σ) for all states ρ, X = σ^{-1/4}ρ^{1/2}σ^{-1/4}`,
  ),
};

const DEFINITIONS: Record<Exclude<ConstantId, EntropyConstant>, string> = {
  gap: 'largest λ with −⟨A,LA⟩_σ ≥ λ ‖A−EA‖²_σ for all observables A, ⟨A,B⟩_σ = Tr σ^{1/2}A*σ^{1/2}B',
  ge: 'largest K with ‖P_tA‖²_ρ ≤ e^{-2Kt} ‖A‖²_{P_t†ρ} for all states ρ, observables A and t ≥ 0',
  cge: 'largest K with ‖P_tA‖²_ρ ≤ e^{-2Kt} ‖A‖²_{P_t†ρ} for L⊗id_k and all states and observables of M⊗M_k, every k',
  be: 'largest K with Γ₂(A,A) ≥ K Γ(A,A) for all observables A',
  cbe: 'largest K with Γ₂ − KΓ completely positive as a form',
  t2: 'largest κ with W(ρ,σ)² ≤ (2/κ) D(ρ‖σ) for all states ρ',
  diameter: 'largest transport distance W(ρ,ρ′) between two states',
  mixing: 'least t with ‖P_t†ρ − E†ρ‖₁ ≤ ε for all states ρ, ‖·‖₁ the trace norm',
};

function inEach(text: (name: ConventionName) => string): Record<ConventionName, string> {
  return { 'two-alpha': text('two-alpha'), 'four-alpha': text('four-alpha'), 'one-alpha': text('one-alpha') };
}
