import { z } from 'zod';
import { Problem } from './problem.js';

/** Where a page of a list ends: publication time to the millisecond, then id. */
export interface Place {
  readonly publishedAt: Date;
  readonly id: string;
}

const place = z.tuple([z.iso.datetime({ precision: 3 }), z.uuid()]);

/** A place in a list as an opaque word for addresses. */
export function writeCursor({ publishedAt, id }: Place): string {
  return Buffer.from(JSON.stringify([publishedAt.toISOString(), id])).toString('base64url');
}

/** The place that a cursor names; throws a problem for a text that is none. */
export function readCursor(text: string): Place {
  const parsed = place.safeParse(parsedJson(Buffer.from(text, 'base64url').toString()));
  if (!parsed.success)
    throw new Problem(400, 'bad-cursor', 'The cursor is not one that the registry gave; begin again without it.');
  const [publishedAt, id] = parsed.data;
  return { publishedAt: new Date(publishedAt), id };
}

function parsedJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
