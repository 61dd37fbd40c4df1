import type { Database } from '../database/connect.js';

/** Adds a line to the record of what was done; it is never changed. */
export async function insertRecord(
  trx: Database,
  {
    memberId,
    action,
    subject,
    details = {},
  }: {
    readonly memberId: string;
    readonly action: string;
    /** What it was done to, such as `owner/slug@version`. */
    readonly subject: string;
    readonly details?: Readonly<Record<string, unknown>>;
  },
): Promise<void> {
  await trx('records').insert({ member_id: memberId, action, subject, details: JSON.stringify(details) });
}
