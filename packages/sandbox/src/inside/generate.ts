import { describeError } from './describe-error.js';
import { describeKind, plainCopy } from './plain-copy.js';
import { Refusal } from './refusal.js';
import { kit } from '../kit/index.js';

/** Names that the module of a generator exports. */
type GeneratorModule = Readonly<Record<string, unknown>>;

/**
 * Runs inside the interpreter: calls what is wanted of the module and answers with `=` and the JSON text of its value, or `!` and that of an
 * `InsideFault`. `thrown` is what the module itself threw while it was loaded.
 */
export function generate(
  loaded: { readonly module: GeneratorModule } | { readonly thrown: unknown },
  want: 'model' | 'claims',
  parameters: string,
  depthLimit: number,
): string {
  try {
    if ('thrown' in loaded) throw loaded.thrown;
    const value = call(loaded.module, want, JSON.parse(parameters));
    return `=${JSON.stringify(plainCopy(value, depthLimit))}`;
  } catch (error) {
    return `!${JSON.stringify(describeError(error))}`;
  }
}

function call(module: GeneratorModule, want: 'model' | 'claims', parameters: object): unknown {
  const name = want === 'model' ? 'default' : 'claims';
  if (module instanceof Promise) {
    throw new Refusal(
      'expected generate.js to run in one go, got await at its top level; compute without async and await',
    );
  }
  const exported = module[name];
  if (exported === undefined && want === 'claims') return [];
  if (typeof exported !== 'function') {
    const example =
      want === 'model' ? 'export default (parameters, kit) => model' : 'export const claims = (parameters) => [...]';
    const got = exported === undefined ? 'no such export' : describeKind(exported);
    throw new Refusal(`expected generate.js to have a function as "${name}", got ${got}; write ${example}`);
  }
  const value: unknown = exported(Object.freeze(parameters), kit);
  if (value === undefined) throw new Refusal(`expected "${name}" to return a value, got undefined; end it with return`);
  return value;
}
