import type { MeanName } from '../metric/operator-mean.js';
import { bestOf } from '../constants/entropy-search.js';
import type { ConstantId, Witness } from './bracket.js';
import type { SheetFinding } from './run-sheet-task.js';

/** The witness with the lowest value among the findings, for `ge` (of the mean), `mlsi`, `clsi` or `lsi`; null when there is none. */
export function bestWitness(findings: readonly SheetFinding[], constant: ConstantId, mean: MeanName): Witness | null {
  return constant === 'ge' ? bestGradientWitness(findings, mean) : bestEntropyWitness(findings, constant);
}

function bestGradientWitness(findings: readonly SheetFinding[], mean: MeanName): Witness | null {
  let best: Witness | null = null;
  for (const finding of findings) {
    if (finding.kind !== 'ge' || finding.mean !== mean) continue;
    const { value, state, observable } = finding.result;
    if (!best || value < best.value) best = { constant: 'ge', mean, value, state, observable, amplification: 1 };
  }
  return best;
}

function bestEntropyWitness(findings: readonly SheetFinding[], constant: ConstantId): Witness | null {
  const results = findings.map((finding) =>
    finding.kind === 'entropy' && finding.result?.constant === constant ? finding.result : null,
  );
  const best = bestOf(results);
  if (!best) return null;
  const { value, state, amplification } = best;
  return { constant, value, state, observable: null, amplification };
}
