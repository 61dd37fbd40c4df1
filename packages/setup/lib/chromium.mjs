import { existsSync } from 'node:fs';
import { ensureDebianPackages } from './debian.mjs';

/** Where Debian's package puts the browser. */
export const CHROMIUM = '/usr/bin/chromium';

/** Makes sure that the browser tests can run; installs Debian's Chromium where it may. */
export function ensureChromium() {
  return ensureDebianPackages(['chromium'], {
    isPresent: async () => existsSync(CHROMIUM),
    purpose: `The tests run generators in Chromium, ${CHROMIUM}, as well.`,
  });
}
