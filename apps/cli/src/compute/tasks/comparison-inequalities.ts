import { INEQUALITY_NAMES, type InequalityName } from '@thalweg/core';
import { encodeMatrix, type ComparisonDocument, type SheetDocument } from '@thalweg/format';
import { inequalityConstants } from './comparison-rows.js';
import type { ComparisonOutcome } from './comparison-tasks.js';

type Inequality = ComparisonDocument['inequalities'][number];

const FORMULAS: Record<InequalityName, string> = {
  contraction: 'W(P_t†ρ,P_t†ν) ≤ e^{−Kt} W(ρ,ν)',
  hwi: 'D ≤ W√I − (K/2)W², W = W(ρ,E†ρ)',
  t2: 'W(ρ,E†ρ)² ≤ (2/κ)D',
  diameter: 'W(ρ,ν) ≤ diameter',
};

/** Each inequality on the pair that comes nearest to breaking it. */
export function worstInequalities(compared: readonly ComparisonOutcome[], sheet: SheetDocument): Inequality[] {
  const { ge, t2, diameter } = inequalityConstants(sheet);
  const constants = { contraction: ge, hwi: ge, t2, diameter };
  return INEQUALITY_NAMES.flatMap((name): Inequality[] => {
    const constant = constants[name];
    const cases = compared.flatMap(({ pair: { start }, inequalities }) =>
      inequalities.filter((found) => found.name === name).map((found) => ({ found, start })),
    );
    const [first, ...rest] = cases;
    if (!constant || first === undefined) return [];
    const { found, start } = rest.reduce((a, b) => (b.found.relative < a.found.relative ? b : a), first);
    const { slack, error, relative, status } = found;
    return [
      {
        name,
        formula: FORMULAS[name],
        constant: constant.value,
        by: constant.by,
        pairs: cases.length,
        slack,
        error,
        relative,
        status,
        state: encodeMatrix(start.from),
        against: encodeMatrix(start.to),
      },
    ];
  });
}
