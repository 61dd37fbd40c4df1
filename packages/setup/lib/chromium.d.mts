/** Where Debian's package puts the browser. */
export const CHROMIUM: string;

/** Makes sure that the browser tests can run; installs Debian's Chromium where it may. */
export function ensureChromium(): Promise<void>;
