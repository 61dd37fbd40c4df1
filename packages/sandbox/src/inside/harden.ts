import { kit } from '../kit/index.js';
import { settleMath } from './settle-math.js';

/** Globals that tell what the program has no part in: memory shared with others, and when memory is collected. */
const REMOVED = ['SharedArrayBuffer', 'Atomics', 'WeakRef', 'FinalizationRegistry'];

/** Objects that only syntax reaches. */
const HIDDEN = [
  function* () {
    yield 0;
  },
  async () => Promise.resolve(),
  async function* () {
    yield Promise.resolve();
  },
  [][Symbol.iterator](),
  new Map().keys(),
  new Set().keys(),
  ''[Symbol.iterator](),
  ''.matchAll(/a/g),
];

/**
 * Takes out what could make two runs differ and freezes every built-in object and the kit, before a generator is loaded: whatever it does to a
 * prototype changes nothing that the kit or the check of its result use.
 */
export const hardened = harden();

function harden(): number {
  for (const name of REMOVED) Reflect.deleteProperty(globalThis, name);
  settleMath();
  const reached = new Set<object>();
  const queue: unknown[] = [globalThis, kit, ...HIDDEN];
  for (const value of queue) {
    if ((typeof value !== 'object' && typeof value !== 'function') || value === null || reached.has(value)) continue;
    reached.add(value);
    if (!isErrorPrototype(value)) Object.freeze(value);
    queue.push(Object.getPrototypeOf(value));
    for (const { value: field, get, set } of Object.values(Object.getOwnPropertyDescriptors(value)))
      queue.push(field, get, set);
    for (const symbol of Object.getOwnPropertySymbols(value)) {
      const { value: field, get, set } = Object.getOwnPropertyDescriptor(value, symbol) ?? {};
      queue.push(field, get, set);
    }
  }
  return reached.size;
}

/** Left open, since assigning `name` or `message` to an error is common and fails where the prototype's own cannot be written. */
function isErrorPrototype(value: object): boolean {
  return value === Error.prototype || Object.getPrototypeOf(value) === Error.prototype;
}
