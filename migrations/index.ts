import * as createMembers from './20261201153000_create_members.js';
import * as createVersions from './20261201153100_create_versions.js';
import * as createRecords from './20261201153200_create_records.js';

/** Every migration, in the order of its name. */
export const MIGRATIONS = {
  '20261201153000_create_members': createMembers,
  '20261201153100_create_versions': createVersions,
  '20261201153200_create_records': createRecords,
} as const;
