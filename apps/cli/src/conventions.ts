/**
 * Conventions under which constants can be printed. Entropy production I(ρ) ≥ c D(ρ‖E†ρ): papers write c = 2α (used
 * throughout here), 4α or α; a constant changes by the stated factor and keeps its meaning.
 */
export const CONVENTIONS = {
  '2alpha': { factor: 1, definition: 'I ≥ 2α D' },
  '4alpha': { factor: 0.5, definition: 'I ≥ 4α D' },
  '1alpha': { factor: 2, definition: 'I ≥ α D' },
} as const;

export type ConventionName = keyof typeof CONVENTIONS;

export const CONVENTION_NAMES = Object.keys(CONVENTIONS) as ConventionName[];
