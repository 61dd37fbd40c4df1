import { ThalwegError } from '@thalweg/core';
import type { Environment } from './user-folders.js';

/** A registry started on this machine. */
const DEFAULT_REGISTRY = 'http://127.0.0.1:8080';

/** Address of the registry: `--registry`, else THALWEG_REGISTRY, else one on this machine; without a slash at the end. */
export function registryAddress(option: string | null, env: Environment): string {
  const text = option ?? env['THALWEG_REGISTRY'] ?? DEFAULT_REGISTRY;
  const url = URL.canParse(text) ? new URL(text) : null;
  if (url && (url.protocol === 'https:' || url.protocol === 'http:') && url.search === '' && url.username === '') {
    return url.href.replace(/\/+$/, '');
  }
  throw new ThalwegError('usage', `--registry: expected an address such as https://registry.example, got "${text}"`);
}
