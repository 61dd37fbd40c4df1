import { homedir } from 'node:os';
import { join } from 'node:path';

/** Variables of the environment. */
export type Environment = Readonly<Record<string, string | undefined>>;

/** Where settings of the user are kept (XDG base directory specification). */
export function configFolder(env: Environment): string {
  return join(env['XDG_CONFIG_HOME'] || join(home(env), '.config'), 'thalweg');
}

/** Where what can be fetched again is kept (XDG base directory specification). */
export function cacheFolder(env: Environment): string {
  return join(env['XDG_CACHE_HOME'] || join(home(env), '.cache'), 'thalweg');
}

function home(env: Environment): string {
  return env['HOME'] || homedir();
}
