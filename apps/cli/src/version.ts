import manifest from '../package.json' with { type: 'json' };

/** Version of the command line, as published. */
export const VERSION: string = manifest.version;

/** How documents name the program that wrote them. */
export const TOOL = { name: 'thalweg', version: VERSION };
