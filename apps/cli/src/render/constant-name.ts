import type { ConstantId, MeanName } from '@thalweg/core';

/** `gap`, `ge:left`, `mixing(0.01)`: how a constant is named to people. */
export function constantName({
  id,
  mean,
  epsilon,
}: {
  readonly id: ConstantId;
  readonly mean?: MeanName | undefined;
  readonly epsilon?: number | undefined;
}): string {
  if (epsilon !== undefined) return `${id}(${epsilon})`;
  return mean !== undefined && mean !== 'logarithmic' ? `${id}:${mean}` : id;
}
