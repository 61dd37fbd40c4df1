import type { z } from 'zod';
import type { PathSegment } from '../json/json-pointer.js';
import { valueAt } from '../json/value-at.js';

export type Issue = z.core.$ZodIssue;

/**
 * The issue worth reporting: a wrong `schema` first, then a misspelt field, then the first in document order. Inside a union it
 * comes from the branch that the value was meant for; where none is clear the union itself is reported.
 */
export function mainIssue(issues: readonly Issue[], value: unknown): Issue {
  const wrongSchema = issues.find((issue) => issue.path.length === 1 && issue.path[0] === 'schema');
  const misspelt = issues.find((issue) => issue.code === 'unrecognized_keys');
  const issue = wrongSchema ?? misspelt ?? issues[0];
  if (issue === undefined) throw new RangeError('a failed schema without an issue');
  if (issue.code !== 'invalid_union') return issue;
  const inside = valueAt(value, issue.path as PathSegment[]);
  const branch = meantBranch(issue.errors, inside);
  if (!branch) return issue;
  const inner = mainIssue(branch, inside);
  return { ...inner, path: [...issue.path, ...inner.path] };
}

/** The branch with the fewest missing and unknown fields; null when two tie or none knows anything of the value. */
function meantBranch(branches: readonly (readonly Issue[])[], value: unknown): readonly Issue[] | null {
  const ranked = branches
    .map((issues) => ({ issues, cost: branchCost(issues, value) }))
    .sort((a, b) => a.cost - b.cost);
  const [best, second] = ranked;
  if (!best || best.cost === Infinity || best.cost === second?.cost || knowsNothing(best.issues, value)) return null;
  return best.issues;
}

function knowsNothing(issues: readonly Issue[], value: unknown): boolean {
  const unknown = issues.find((issue) => issue.code === 'unrecognized_keys' && issue.path.length === 0);
  return unknown?.code === 'unrecognized_keys' && unknown.keys.length === Object.keys(value ?? {}).length;
}

function branchCost(issues: readonly Issue[], value: unknown): number {
  let cost = 0;
  for (const issue of issues) {
    const atRoot = issue.path.length === 0;
    if (issue.code === 'unrecognized_keys' && atRoot) cost += issue.keys.length;
    else if (atRoot && issue.code !== 'custom') return Infinity;
    else if (issue.path.length === 1 && valueAt(value, issue.path as PathSegment[]) === undefined) cost += 1;
  }
  return cost;
}
