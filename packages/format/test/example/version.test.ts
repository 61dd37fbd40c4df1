import { describe, expect, it } from 'vitest';
import { isVersion, versionParts } from '../../src/example/version.js';

describe('versions (SemVer 2.0.0)', () => {
  it.each([
    ['1.0.0', { major: 1, minor: 0, patch: 0, prerelease: '' }],
    ['12.3.45-alpha.7', { major: 12, minor: 3, patch: 45, prerelease: 'alpha.7' }],
  ])('%s', (version, parts) => {
    expect(isVersion(version)).toBe(true);
    expect(versionParts(version)).toEqual(parts);
  });

  it.each(['v1.0.0', '1.0', '01.0.0', '1.0.0+build', '1.0.0-', ''])('not %j', (version) => {
    expect(isVersion(version)).toBe(false);
  });

  it('has no parts of what is none', () => {
    expect(() => versionParts('one')).toThrow('got one');
  });
});
