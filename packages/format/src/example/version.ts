import parse from 'semver/functions/parse.js';

/** Whether a text is a version under SemVer 2.0.0 as it is written, without a leading v; build metadata are refused. */
export function isVersion(text: string): boolean {
  return parse(text)?.version === text;
}

/** The parts of a version by which it is ordered; throws for a text that is none. */
export function versionParts(version: string): {
  readonly major: number;
  readonly minor: number;
  readonly patch: number;
  /** Empty for a release. */
  readonly prerelease: string;
} {
  const parsed = parse(version);
  if (!parsed) throw new TypeError(`expected a version under SemVer 2.0.0, got ${version}`);
  const { major, minor, patch, prerelease } = parsed;
  return { major, minor, patch, prerelease: prerelease.join('.') };
}
