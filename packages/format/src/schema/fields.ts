import { z } from 'zod';
import { LIST_LIMIT, TEXT_LIMIT } from '../limits.js';
import { describeValue } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';

/** A finite number. */
export const finite = z.number();

/** A title, label, note or name. */
export const text = z.string().max(TEXT_LIMIT);

/** A SHA-256 digest in lower-case hexadecimal. */
export const digest = z.string().regex(/^[0-9a-f]{64}$/, 'expected a SHA-256 digest of 64 digits 0-9a-f');

/** A whole number of at least `least`. */
export function whole(least: number) {
  return z.int().min(least, `expected a whole number of at least ${least}`);
}

/** An object with exactly these fields; an unknown one is reported with the known ones. */
export function strict<T extends z.core.$ZodLooseShape>(shape: T) {
  return z.strictObject(shape, {
    error: (issue) => (issue.code === 'unrecognized_keys' ? Object.keys(shape).join(', ') : undefined),
  });
}

/** A list of bounded length; the length is checked before any item, so that errors stay few. */
export function list<T extends z.ZodType>(item: T, min = 0): z.ZodType<z.output<T>[]> {
  const checked = z.array(z.unknown()).min(min).max(LIST_LIMIT);
  return checked.pipe(z.array(item) as unknown as z.ZodType<z.output<T>[], unknown[]>);
}

/** A union whose failure is described by `expected` when no branch is clearly meant. */
export function oneOf<const T extends readonly [z.ZodType, ...z.ZodType[]]>(expected: string, options: T) {
  return z.union(options, { error: `expected ${expected}` });
}

/** Adds a check that finds the first fault of a value with the right types. */
export function withoutFault<T extends z.ZodType>(schema: T, find: (value: z.output<T>) => Fault | null): T {
  return schema.superRefine((value, context) => {
    const found = find(value);
    if (!found) return;
    const { code, message, path, details } = found;
    context.addIssue({ code: 'custom', message, path: [...path], params: { code, details } });
  });
}

/** A text that passes a test; `expected` says which texts do. */
export function textThat(passes: (value: string) => boolean, expected: string) {
  return withoutFault(z.string(), (value) =>
    passes(value) ? null : fault('wrong-schema', `expected ${expected}, got ${describeValue(value)}; correct it`),
  );
}
