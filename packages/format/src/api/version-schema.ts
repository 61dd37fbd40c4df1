import { z } from 'zod';
import { exampleSchema } from '../example/example-schema.js';

const hex = z.string().regex(/^[0-9a-f]{64}$/);

/** One published version as lists show it, `thalweg.version/1`. */
export const versionSummarySchema = z.object({
  schema: z.literal('thalweg.version/1'),
  /** `owner/slug`. */
  example: z.string(),
  version: z.string(),
  title: z.string(),
  summary: z.string(),
  /** SHA-256 of the archive. */
  digest: hex,
  /** Bytes of the archive. */
  size: z.int().positive(),
  listed: z.boolean(),
  publishedBy: z.string(),
  publishedAt: z.iso.datetime(),
  withdrawn: z.object({ at: z.iso.datetime(), because: z.string() }).nullable(),
  /** Path of the archive on the registry. */
  archive: z.string(),
});

/** One published version with its description and files. */
export const versionSchema = versionSummarySchema.extend({
  document: exampleSchema,
  files: z.array(z.object({ path: z.string(), digest: hex, size: z.int().nonnegative() })),
});

/** A page of examples by their newest versions, `thalweg.examples/1`. */
export const examplesSchema = z.object({
  schema: z.literal('thalweg.examples/1'),
  examples: z.array(versionSummarySchema),
  /** Cursor of the next page; null on the last. */
  next: z.string().nullable(),
});

/** The listed versions of one example, newest precedence first, `thalweg.history/1`. */
export const historySchema = z.object({
  schema: z.literal('thalweg.history/1'),
  example: z.string(),
  versions: z.array(versionSummarySchema),
});

/** What was published, `thalweg.publication/1`. */
export const publicationSchema = z.object({
  schema: z.literal('thalweg.publication/1'),
  example: z.string(),
  version: z.string(),
  digest: hex,
  listed: z.boolean(),
  path: z.string(),
});

/** Whose token it is and what it allows, `thalweg.member/1`. */
export const memberSchema = z.object({
  schema: z.literal('thalweg.member/1'),
  name: z.string(),
  role: z.enum(['member', 'reviewer', 'administrator']),
  scopes: z.array(z.string()),
});

/** Why a request was refused: problem details (RFC 9457). */
export const problemSchema = z.object({
  status: z.int(),
  code: z.string(),
  detail: z.string(),
  errors: z
    .array(
      z.object({
        code: z.string(),
        detail: z.string(),
        pointer: z.string().optional(),
        document: z.string().optional(),
      }),
    )
    .optional(),
});

export type VersionSummary = z.infer<typeof versionSummarySchema>;
export type VersionDocument = z.infer<typeof versionSchema>;
export type ExamplesDocument = z.infer<typeof examplesSchema>;
export type HistoryDocument = z.infer<typeof historySchema>;
export type PublicationDocument = z.infer<typeof publicationSchema>;
export type MemberDocument = z.infer<typeof memberSchema>;
