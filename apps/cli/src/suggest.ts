/** The known name closest to a mistyped one, or null when none is near (a third of its letters may differ, at least 1). */
export function suggest(mistyped: string, known: readonly string[]): string | null {
  let best: string | null = null;
  let bestDistance = Math.max(1, Math.floor(mistyped.length / 3)) + 1;
  for (const name of known) {
    const distance = editDistance(mistyped.toLowerCase(), name.toLowerCase());
    if (distance < bestDistance) {
      best = name;
      bestDistance = distance;
    }
  }
  return best;
}

/** Optimal string alignment: insertions, deletions, substitutions and swaps of neighbours, each counted once. */
function editDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const substitution = at(last, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let cost = Math.min(at(last, j) + 1, at(row, j - 1) + 1, substitution);
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (swapped) cost = Math.min(cost, at(beforeLast, j - 2) + 1);
      row.push(cost);
    }
    beforeLast = last;
    last = row;
  }
  return at(last, b.length);
}

function at(row: readonly number[], index: number): number {
  return row[index] ?? Number.POSITIVE_INFINITY;
}
