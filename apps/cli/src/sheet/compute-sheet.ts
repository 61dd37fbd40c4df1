import { only } from '../compute/only.js';
import type { ConventionName, RowKey, SheetFinding, SheetRequest } from '@thalweg/core';
import type { SheetDocument } from '@thalweg/format';
import type { DocumentSource } from '../input/read-source.js';
import type { ComputeLimits, Session } from '../session.js';

/** What a sheet is computed from. */
export interface SheetJob {
  readonly source: DocumentSource;
  readonly rows: readonly RowKey[];
  readonly seed: number;
  readonly convention: ConventionName;
  readonly limits: ComputeLimits;
  /** Search even for what is closed already: a witness is wanted, not a bracket. */
  readonly searchClosed?: boolean;
}

export interface ComputedSheet {
  readonly sheet: SheetDocument;
  /** What every task found, in the order of the tasks. */
  readonly findings: readonly SheetFinding[];
  /** What the time limit cut short: all but the theorems, or some searches. */
  readonly unfinished: Unfinished | null;
}

export type Unfinished = 'proofs' | 'searches';

/** What a reader of the result is told, `more` being what more time may do. */
export function unfinishedNote(unfinished: Unfinished, more: string): string {
  return unfinished === 'proofs'
    ? 'The time limit ended the eigenvalue problems: only what theorems give is here. Give more with --time-limit.'
    : `The time limit ended some searches early: ${more}.`;
}

/** ε of `mixing` on a sheet, trace norm. */
const MIXING_EPSILON = 0.01;

/** What a sheet asks for, the same wherever it is computed. */
export function sheetRequest(rows: readonly RowKey[], seed: number): SheetRequest {
  return { rows, seed, randomStarts: null, epsilon: MIXING_EPSILON };
}

/** Computes a sheet on the pool: eigenvalue problems first, then the searches still needed, spread over the threads. */
export async function computeSheet(job: SheetJob, session: Session): Promise<ComputedSheet> {
  const { source, rows, seed, convention, limits } = job;
  const request = sheetRequest(rows, seed);
  const started = Date.now();
  return session.compute(limits, async (pool) => {
    session.output.progress('eigenvalue problems and lifts');
    const [proofs] = await pool.run('sheet-proofs', [{ source, request, searchClosed: job.searchClosed ?? false }]);
    const { findings, searches } = proofs?.done ? proofs.result : { findings: [], searches: [] };
    const tell = (done: number): void =>
      session.output.progress(`searching: ${done} of ${searches.length} starts done`);
    tell(0);
    const inputs = searches.map((task) => ({ source, task }));
    const outcomes = await pool.run('sheet-search', inputs, tell);
    const found: SheetFinding[] = [...findings];
    for (const outcome of outcomes) if (outcome.done) found.push(outcome.result);
    const sheet = only(await pool.run('sheet-document', [{ source, request, findings: found, convention }]));
    const late = limits.timeLimit !== null && Date.now() - started >= limits.timeLimit;
    const unfinished = !proofs?.done
      ? 'proofs'
      : late || found.length < findings.length + searches.length
        ? 'searches'
        : null;
    return { sheet, findings: found, unfinished };
  });
}
