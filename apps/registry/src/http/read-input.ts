import type { z } from 'zod';
import { jsonPointer } from '@thalweg/format';
import { Problem } from './problem.js';

/** The query of an address under a schema, completed with its defaults. */
export function readQuery<Schema extends z.ZodType>(schema: Schema, query: unknown): z.infer<Schema> {
  return parsed(schema, query, 400, 'bad-query', 'The address asks for something that is not understood.');
}

/** A JSON body under a schema. */
export function readBody<Schema extends z.ZodType>(schema: Schema, body: unknown): z.infer<Schema> {
  return parsed(schema, body, 422, 'bad-body', 'The body is not what is expected here.');
}

function parsed<Schema extends z.ZodType>(
  schema: Schema,
  value: unknown,
  status: number,
  code: string,
  detail: string,
): z.infer<Schema> {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw new Problem(status, code, detail, {
    errors: result.error.issues.map(({ path, message }) => ({
      code,
      detail: message,
      pointer: jsonPointer(path.map((part) => (typeof part === 'symbol' ? String(part) : part))),
    })),
  });
}
