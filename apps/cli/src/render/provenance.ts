import type { ConstantDocument, EndDocument } from '@thalweg/format';

/**
 * How an end is known, in words. Ends passed on from another constant carry the whole chain, "ge ≤ mlsi; cge ≤ ge; lift of ∂";
 * it is cut behind the first link that names another row of the same sheet at which the rest stands.
 */
export function provenance(end: EndDocument, row: ConstantDocument, rows: readonly ConstantDocument[]): string {
  const chain = chainOf(end);
  let shortest = chain;
  for (const other of rows) {
    if (other === row) continue;
    for (const source of [other.lower, other.upper]) {
      const link = source === null ? null : linkTo(chain, chainOf(source));
      if (link !== null && link.length < shortest.length && mentions(link, other)) shortest = link;
    }
  }
  return shortest;
}

/** An unbounded end has its reason in the note. */
function chainOf(end: EndDocument): string {
  return end.value === null ? (end.note ?? end.by) : end.by;
}

/** What stands before `rest` at the end of a chain; null when it does not. */
function linkTo(chain: string, rest: string): string | null {
  if (chain.length <= rest.length || !chain.endsWith(rest)) return null;
  const link = /^(.*)[;:] $/s.exec(chain.slice(0, -rest.length));
  return link?.[1] ?? null;
}

function mentions(link: string, { id }: ConstantDocument): boolean {
  return new RegExp(`(^|[^a-z0-9])${id}([^a-z0-9]|$)`).test(link);
}
