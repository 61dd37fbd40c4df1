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
  /** Searches cut short by the time limit. */
  readonly unfinished: number;
}

/** ε of `mixing` on a sheet, trace norm. */
const MIXING_EPSILON = 0.01;

/** Computes a sheet on the pool: eigenvalue problems first, then the searches still needed, spread over the threads. */
export async function computeSheet(job: SheetJob, session: Session): Promise<ComputedSheet> {
  const { source, rows, seed, convention, limits } = job;
  const request: SheetRequest = { rows, seed, randomStarts: null, epsilon: MIXING_EPSILON };
  const started = Date.now();
  return session.compute(limits, async (pool) => {
    session.output.progress('eigenvalue problems and lifts');
    const { findings, searches } = only(
      await pool.run('sheet-proofs', [{ source, request, searchClosed: job.searchClosed ?? false }]),
    );
    session.output.progress(`searching, ${searches.length} starts`);
    const outcomes = await pool.run(
      'sheet-search',
      searches.map((task) => ({ source, task })),
    );
    const found: SheetFinding[] = [...findings];
    for (const outcome of outcomes) if (outcome.done) found.push(outcome.result);
    const sheet = only(await pool.run('sheet-document', [{ source, request, findings: found, convention }]));
    const late = limits.timeLimit !== null && Date.now() - started >= limits.timeLimit;
    const missing = outcomes.filter((outcome) => !outcome.done).length;
    return { sheet, findings: found, unfinished: late ? Math.max(1, missing) : missing };
  });
}
