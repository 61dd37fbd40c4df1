import type { FlowDocument } from '@thalweg/format';

/** A flow as comma-separated values (RFC 4180, lines ended by LF): one line a time, all digits; `inf` for an infinite production. */
export function flowCsv({ points, bounds }: FlowDocument): string {
  const names = bounds.map(({ quantity, constant }) => `${quantity}_bound_${constant}`);
  const head = ['time', 'entropy', 'production', 'distance', 'state_error', ...names];
  const lines = points.map(({ time, entropy, production, distance, stateError }, k) => [
    time,
    entropy,
    production ?? 'inf',
    distance,
    stateError,
    ...bounds.map(({ values }) => values[k] ?? ''),
  ]);
  return [head, ...lines].map((cells) => `${cells.join(',')}\n`).join('');
}
