import type { Verb } from './verb.js';

/** Every verb, loaded when it is called: `--help` and `--version` then load none. */
const VERBS = {
  inspect: async () => (await import('./inspect/inspect-verb.js')).verb as Verb<unknown>,
  constants: async () => (await import('./constants/constants-verb.js')).verb as Verb<unknown>,
  check: async () => (await import('./check/check-verb.js')).verb as Verb<unknown>,
  witness: async () => (await import('./witness/witness-verb.js')).verb as Verb<unknown>,
  certify: async () => (await import('./certify/certify-verb.js')).verb as Verb<unknown>,
  verify: async () => (await import('./verify/verify-verb.js')).verb as Verb<unknown>,
  compare: async () => (await import('./compare/compare-verb.js')).verb as Verb<unknown>,
  distance: async () => (await import('./distance/distance-verb.js')).verb as Verb<unknown>,
  relief: async () => (await import('./relief/relief-verb.js')).verb as Verb<unknown>,
  flow: async () => (await import('./flow/flow-verb.js')).verb as Verb<unknown>,
  draft: async () => (await import('./draft/draft-verb.js')).verb as Verb<unknown>,
  model: async () => (await import('./model/model-verb.js')).verb as Verb<unknown>,
  sweep: async () => (await import('./sweep/sweep-verb.js')).verb as Verb<unknown>,
  seal: async () => (await import('./seal/seal-verb.js')).verb as Verb<unknown>,
  reproduce: async () => (await import('./reproduce/reproduce-verb.js')).verb as Verb<unknown>,
  'sign-in': async () => (await import('./sign-in/sign-in-verb.js')).verb as Verb<unknown>,
  'sign-out': async () => (await import('./sign-out/sign-out-verb.js')).verb as Verb<unknown>,
  publish: async () => (await import('./publish/publish-verb.js')).verb as Verb<unknown>,
  browse: async () => (await import('./browse/browse-verb.js')).verb as Verb<unknown>,
  read: async () => (await import('./read/read-verb.js')).verb as Verb<unknown>,
  download: async () => (await import('./download/download-verb.js')).verb as Verb<unknown>,
  withdraw: async () => (await import('./withdraw/withdraw-verb.js')).verb as Verb<unknown>,
  completion: async () => (await import('./completion/completion-verb.js')).verb as Verb<unknown>,
};

export type VerbName = keyof typeof VERBS;

export function loadVerb(name: VerbName): Promise<Verb<unknown>> {
  return VERBS[name]();
}
