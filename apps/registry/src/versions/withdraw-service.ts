import type { Principal } from '../auth/principal.js';
import type { Database } from '../database/connect.js';
import { Problem } from '../http/problem.js';
import { insertRecord } from '../records/record-store.js';
import { nameText, type VersionName } from './version-name.js';
import { findVersion, type VersionRow } from './version-store.js';

/** Withdraws a version: it leaves what is browsed, stays readable and says why. Nothing else changes, and it is done once. */
export async function withdraw(
  db: Database,
  principal: Principal,
  name: VersionName,
  because: string,
): Promise<VersionRow> {
  return db.transaction(async (trx) => {
    const found = await findVersion(trx, name);
    const subject = nameText(name);
    if (!found || (!found.listed && principal.name !== name.owner)) {
      throw new Problem(404, 'not-found', `There is no version ${subject}.`);
    }
    if (principal.name !== name.owner) {
      throw new Problem(403, 'not-owner', `Only ${name.owner} withdraws it; you are ${principal.name}.`);
    }
    const changed = await trx('versions')
      .where({ id: found.id, withdrawn_at: null })
      .update({ withdrawn_at: trx.fn.now(), withdrawn_because: because });
    if (changed === 0) throw new Problem(409, 'already-withdrawn', `${subject} is withdrawn already.`);
    await insertRecord(trx, { memberId: principal.memberId, action: 'withdraw', subject, details: { because } });
    return (await findVersion(trx, name)) as VersionRow;
  });
}
