import type { z } from 'zod';
import { faultError } from '../fault.js';
import { describeFailure } from './describe-issue.js';

/** The value as the schema's type, or one error with its JSON pointer; `base` is where the value sits in its document. */
export function checkDocument<T>(schema: z.ZodType<T>, value: unknown, base = ''): T {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw faultError(describeFailure(result.error, value), base);
}
