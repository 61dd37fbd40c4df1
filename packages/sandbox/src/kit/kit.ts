import * as names from './names.js';
import { KIT_VERSION } from './version.js';

/** What a generator receives as its second argument; `KIT.md` of this package describes every name. */
export const kit = Object.freeze({ version: KIT_VERSION, ...names });
