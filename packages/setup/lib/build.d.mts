/** Builds apps/cli/dist when the sources changed since the last build. */
export function ensureBundle(): Promise<void>;
