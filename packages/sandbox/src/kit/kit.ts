import * as names from './names.js';

/**
 * What a generator receives as its second argument. The version follows Semantic Versioning: within a major version
 * no function changes a bit of what it returns.
 */
export const kit = Object.freeze({ version: '1.0.0', ...names });
