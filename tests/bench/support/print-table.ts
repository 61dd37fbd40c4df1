import { availableParallelism, loadavg } from 'node:os';

/** Print a Markdown table, its columns padded, under a line that says on what machine and how busy it was. */
export function printTable(head: readonly string[], rows: readonly (readonly string[])[]): void {
  const widths = head.map((title, k) => Math.max(title.length, ...rows.map((row) => row[k]?.length ?? 0)));
  const line = (cells: readonly string[]): string => `| ${cells.map((x, k) => x.padEnd(widths[k] ?? 0)).join(' | ')} |`;
  const busy = loadavg()[0]?.toFixed(1);
  process.stdout.write(
    [
      `Node ${process.versions.node}, ${availableParallelism()} processors, load ${busy}`,
      '',
      line(head),
      line(widths.map((width) => '-'.repeat(width))),
      ...rows.map(line),
      '',
    ].join('\n'),
  );
}

/** Seconds to three significant digits. */
export function seconds(x: number): string {
  return x < 0.01 ? `${(1000 * x).toFixed(1)} ms` : `${x.toPrecision(3)} s`;
}
