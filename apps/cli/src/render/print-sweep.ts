import type { Output } from '../output/output.js';
import { lineOf } from '../sweep/journal.js';
import { sweepCsv } from './sweep-csv.js';
import type { SweepResult } from './sweep-result.js';
import { sweepTable } from './sweep-table.js';

/** Prints a sweep: JSON lines (the sweep, then its points), comma-separated values, or a table. */
export function printSweep(result: SweepResult, { csv }: { readonly csv: boolean }, output: Output): void {
  if (output.json) output.result([result.sweep, ...result.points].map(lineOf).join(''));
  else if (csv) output.result(sweepCsv(result));
  else output.result(sweepTable(result, output));
}
