import parse from 'semver/functions/parse.js';

/** Whether a text is a version under SemVer 2.0.0 as it is written, without a leading v; build metadata are refused. */
export function isVersion(text: string): boolean {
  return parse(text)?.version === text;
}
