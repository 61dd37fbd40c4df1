/**
 * Positions near the wanted ones, at least `step` apart and inside [low, high] where there is room, in the order of the wanted
 * ones: neighbours that collide share the displacement (pool adjacent violators).
 */
export function spreadApart(wanted: readonly number[], step: number, low: number, high: number): number[] {
  const order = wanted.map((_, k) => k).sort((a, b) => (wanted[a] ?? 0) - (wanted[b] ?? 0));
  const pools: { sum: number; count: number }[] = [];
  order.forEach((k, rank) => {
    pools.push({ sum: (wanted[k] ?? 0) - rank * step, count: 1 });
    for (let last = pools.at(-1); pools.length > 1; last = pools.at(-1)) {
      const before = pools.at(-2);
      if (!last || !before || before.sum / before.count <= last.sum / last.count) break;
      pools.splice(-2, 2, { sum: before.sum + last.sum, count: before.count + last.count });
    }
  });
  const out = wanted.map(() => 0);
  const room = high - (wanted.length - 1) * step;
  let rank = 0;
  for (const { sum, count } of pools) {
    const base = Math.max(low, Math.min(sum / count, Math.max(low, room)));
    for (let i = 0; i < count; i++, rank++) out[order[rank] ?? 0] = base + rank * step;
  }
  return out;
}
