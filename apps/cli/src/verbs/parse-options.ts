import { ThalwegError } from '@thalweg/core';
import * as z from 'zod';

/** Turns raw options into a plan, or throws one `usage` error: the first problem, in words. */
export function parseOptions<Schema extends z.ZodType>(schema: Schema, raw: unknown): z.output<Schema> {
  const result = schema.safeParse(raw);
  if (result.success) return result.data;
  const issue = result.error.issues[0];
  throw new ThalwegError('usage', issue?.message ?? 'the options could not be read');
}

/** Text option that `read` turns into a value; a `usage` error of `read` becomes the option's problem. */
export function textOption<Value>(read: (text: string) => Value) {
  return z.string().transform((text, context) => {
    try {
      return read(text);
    } catch (error) {
      if (!(error instanceof ThalwegError)) throw error;
      context.addIssue({ code: 'custom', message: error.message });
      return z.NEVER;
    }
  });
}
