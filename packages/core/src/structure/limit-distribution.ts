/**
 * Where the chain with these rates ends when it starts uniformly: lim μe^{tQ}, μ = (1/n,…,1/n). `rates` is n×n row-major, x→y
 * off the diagonal (the diagonal is not read). By censoring states one after the other, without subtractions, so that even the
 * smallest weight has full relative accuracy (Grassmann, Taksar & Heyman, Oper. Res. 33 (1985)).
 */
export function limitDistribution(rates: Float64Array, n: number): Float64Array {
  const classes = communicatingClasses(rates, n);
  const closed = classes.filter((list) => isClosed(rates, n, list));
  const q = rates.slice();
  const mass = new Float64Array(n).fill(1 / n);
  const recurrent = new Set(closed.flat());
  const transient = Array.from({ length: n }, (_, x) => x).filter((x) => !recurrent.has(x));
  let remaining = Array.from({ length: n }, (_, x) => x);
  for (const k of transient) {
    remaining = remaining.filter((x) => x !== k);
    censor(q, n, k, remaining, mass);
  }
  const limit = new Float64Array(n);
  for (const list of closed) {
    const total = list.reduce((sum, x) => sum + mass[x], 0);
    stationary(rates, n, list).forEach((p, at) => (limit[list[at]] = total * p));
  }
  return limit;
}

/** Remove state k: its rates and its mass go where it would jump next among the remaining states. */
function censor(q: Float64Array, n: number, k: number, remaining: readonly number[], mass: Float64Array): void {
  const leaving = remaining.reduce((sum, j) => sum + q[k * n + j], 0);
  for (const j of remaining) {
    const share = q[k * n + j] / leaving;
    if (!(share > 0)) continue;
    mass[j] += mass[k] * share;
    for (const i of remaining) if (i !== j) q[i * n + j] += q[i * n + k] * share;
  }
}

/** Stationary distribution of one closed class, in the order of its list. */
function stationary(rates: Float64Array, n: number, list: readonly number[]): Float64Array {
  const m = list.length;
  const q = new Float64Array(m * m);
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) q[i * m + j] = rates[list[i] * n + list[j]];
  for (let k = m - 1; k > 0; k--) {
    let leaving = 0;
    for (let j = 0; j < k; j++) leaving += q[k * m + j];
    for (let i = 0; i < k; i++) {
      q[i * m + k] /= leaving;
      const share = q[i * m + k];
      if (!(share > 0)) continue;
      for (let j = 0; j < k; j++) q[i * m + j] += share * q[k * m + j];
    }
  }
  const p = new Float64Array(m);
  p[0] = 1;
  let total = 1;
  for (let k = 1; k < m; k++) {
    for (let i = 0; i < k; i++) p[k] += p[i] * q[i * m + k];
    total += p[k];
  }
  return p.map((x) => x / total);
}

/** Strongly connected components of the graph of positive rates (Kosaraju & Sharir), each ascending. */
function communicatingClasses(rates: Float64Array, n: number): number[][] {
  const order: number[] = [];
  const seen = new Uint8Array(n);
  for (let x = 0; x < n; x++) depthFirst(x, n, seen, (a, b) => rates[a * n + b] > 0, order);
  const classes: number[][] = [];
  seen.fill(0);
  for (const x of order.reverse()) {
    const found: number[] = [];
    depthFirst(x, n, seen, (a, b) => rates[b * n + a] > 0, found);
    if (found.length > 0) classes.push(found.sort((a, b) => a - b));
  }
  return classes;
}

/** Append what is reachable from x and not yet seen, in order of completion. */
function depthFirst(
  x: number,
  n: number,
  seen: Uint8Array,
  joined: (a: number, b: number) => boolean,
  finished: number[],
): void {
  if (seen[x]) return;
  seen[x] = 1;
  const stack = [{ node: x, next: 0 }];
  while (stack.length > 0) {
    const top = stack[stack.length - 1];
    while (top.next < n && (seen[top.next] || top.next === top.node || !joined(top.node, top.next))) top.next++;
    if (top.next === n) {
      finished.push(top.node);
      stack.pop();
    } else {
      seen[top.next] = 1;
      stack.push({ node: top.next, next: 0 });
    }
  }
}

function isClosed(rates: Float64Array, n: number, list: readonly number[]): boolean {
  const inside = new Set(list);
  return list.every((x) => {
    for (let y = 0; y < n; y++) if (!inside.has(y) && rates[x * n + y] > 0) return false;
    return true;
  });
}
