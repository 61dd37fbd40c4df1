import type { DiscretePath } from './discrete-path.js';
import type { MetricKernel } from './metric-kernel.js';

/**
 * A path with `parts` equal pieces for each of its own, through the same states: cubic in time through the four nearest nodes, or
 * straight where that would leave the faithful states. States keep what every node conserves.
 */
export function refinePath(kernel: MetricKernel, { times, states }: DiscretePath, parts: number): DiscretePath {
  const last = states.length - 1;
  const fineTimes = new Float64Array(last * parts + 1);
  const fineStates: Float64Array[] = [];
  for (let k = 0; k < last; k++) {
    const width = times[k + 1] - times[k];
    const inner = Array.from({ length: parts - 1 }, (_, j) => times[k] + (width * (j + 1)) / parts);
    const smooth = inner.map((t) => cubicAt(times, states, k, t));
    const isFaithful = smooth.every((x) => kernel.isFaithful(x));
    fineTimes[k * parts] = times[k];
    fineStates.push(states[k]);
    inner.forEach((t, j) => {
      fineTimes[k * parts + j + 1] = t;
      fineStates.push(isFaithful ? smooth[j] : between(states[k], states[k + 1], (j + 1) / parts));
    });
  }
  fineTimes[last * parts] = times[last];
  fineStates.push(states[last]);
  return { times: fineTimes, states: fineStates };
}

/** The state of a path at a time between its nodes, as `refinePath` has it. */
export function stateAt(kernel: MetricKernel, { times, states }: DiscretePath, time: number): Float64Array {
  let k = 0;
  while (k + 2 < times.length && time > times[k + 1]) k++;
  const share = (time - times[k]) / (times[k + 1] - times[k]);
  if (share <= 0) return states[k];
  if (share >= 1) return states[k + 1];
  const smooth = cubicAt(times, states, k, time);
  return kernel.isFaithful(smooth) ? smooth : between(states[k], states[k + 1], share);
}

/** (1 − s) x + s y. */
export function between(x: Float64Array, y: Float64Array, s: number): Float64Array {
  return x.map((value, i) => (1 - s) * value + s * y[i]);
}

/** Lagrange interpolation through the nodes k − 1, …, k + 2, moved inside the mesh. */
function cubicAt(times: Float64Array, states: readonly Float64Array[], k: number, t: number): Float64Array {
  const last = states.length - 1;
  const first = Math.max(0, Math.min(last - 3, k - 1));
  const end = Math.min(last, first + 3);
  const out = new Float64Array(states[0].length);
  for (let p = first; p <= end; p++) {
    let weight = 1;
    for (let q = first; q <= end; q++) if (q !== p) weight *= (t - times[q]) / (times[p] - times[q]);
    const x = states[p];
    for (let i = 0; i < x.length; i++) out[i] += weight * x[i];
  }
  return out;
}
