import { fileURLToPath } from 'node:url';

/** Top folder of the repository, with a trailing separator removed. */
export const root = fileURLToPath(new URL('../../../', import.meta.url)).replace(/[\\/]$/, '');
