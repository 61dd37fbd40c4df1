import manifest from '../package.json' with { type: 'json' };

/** Version of the command line, as published. */
export const VERSION: string = manifest.version;
