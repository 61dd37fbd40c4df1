import type { SandboxLimits } from '../../src/limits.js';

/** A generator that must not get away with it. */
export interface Hostile {
  readonly name: string;
  readonly source: string;
  readonly code: 'generator-failed' | 'time-limit' | 'too-large';
  /** Part of the message that it must give. */
  readonly message: string;
  readonly pointer?: string;
  readonly limits?: Partial<SandboxLimits>;
}

const BRIEF: Partial<SandboxLimits> = { milliseconds: 300 };

const endless = (name: string, source: string): Hostile => ({
  name,
  source,
  code: 'time-limit',
  message: 'expected generate.js to end within 300 ms, it did not',
  limits: BRIEF,
});

const greedy = (name: string, source: string): Hostile => ({
  name,
  source,
  code: 'too-large',
  message: 'expected generate.js to use at most 32 MiB of memory, it asked for more',
  limits: { memoryMegabytes: 32 },
});

const failing = (name: string, source: string, message: string, pointer?: string): Hostile => ({
  name,
  source,
  code: 'generator-failed',
  message,
  ...(pointer !== undefined && { pointer }),
});

const model = (body: string): string => `export default (parameters, kit) => { ${body} };`;
const value = (expression: string): string => `export default () => (${expression});`;

const time: Hostile[] = [
  endless('an endless loop', model('for (;;);')),
  endless('an endless loop while the module is loaded', 'while (true) {} export default () => 1;'),
  endless(
    'an endless loop that catches everything',
    model('for (;;) { try { for (;;); } catch {} finally { for (;;); } }'),
  ),
  endless('a regular expression that backtracks without end', model('return /^(a+)+$/.test("a".repeat(60) + "!");')),
  endless('a getter that loops', value('{ get schema() { for (;;); } }')),
  endless('a proxy that loops', value('new Proxy({}, { ownKeys() { for (;;); } })')),
  endless(
    'a thrown object whose message loops',
    model('throw Object.defineProperty(new Error(), "message", { get() { for (;;); } });'),
  ),
  endless(
    'an iterator that never ends',
    model('for (const x of { [Symbol.iterator]: () => ({ next: () => ({ value: 1, done: false }) }) });'),
  ),
  endless(
    'a sort that never agrees',
    model('const a = Array.from({ length: 1e5 }, (_, k) => k); for (;;) a.sort(() => 1);'),
  ),
  endless(
    'a loop of coroutines',
    model('function* g() { yield* h(); } function* h() { for (;;) yield 1; } for (const x of g());'),
  ),
];

const memory: Hostile[] = [
  greedy('an array that grows', model('const a = []; for (;;) a.push(new Array(1000).fill(1.5));')),
  greedy(
    'a text that doubles',
    model('let t = "ab"; const all = []; for (;;) { if (t.length < 1e6) t += t; all.push(t + all.length); }'),
  ),
  greedy('typed arrays without end', model('const a = []; for (;;) a.push(new Float64Array(1e5).fill(1));')),
  greedy('a map without end', model('const m = new Map(); for (let k = 0; ; k++) m.set(k, { k });')),
  greedy('a flood of promises', model('const f = () => Promise.resolve(1).then(f); for (;;) f();')),
  greedy('closures that hold each other', model('let f = () => 0; for (;;) { const g = f; f = () => g; }')),
  greedy('an array-like of astronomic length', model('Array.prototype.fill.call({ length: 2 ** 53 - 1 }, 1);')),
  greedy(
    'a matrix of the kit that is far too large',
    model('return kit.kron(...new Array(12).fill([[1, 1], [1, 1]]));'),
  ),
  {
    name: 'a giant output',
    source: value('"x".repeat(200000)'),
    code: 'too-large',
    message: 'expected generate.js to return at most 100000 bytes of JSON, got 200002',
    limits: { outputBytes: 100_000 },
  },
  {
    name: 'a giant output of many bytes a character',
    source: value('"\\u20ac".repeat(50000)'),
    code: 'too-large',
    message: 'expected generate.js to return at most 100000 bytes of JSON, got 150002',
    limits: { outputBytes: 100_000 },
  },
  {
    name: 'a source that is too long',
    source: `export default () => 1; //${'x'.repeat(2 ** 20)}`,
    code: 'too-large',
    message: 'expected generate.js to have at most 1048576 characters',
  },
  failing(
    'a buffer larger than there is',
    model('new ArrayBuffer(2 ** 40);'),
    'RangeError: invalid array buffer length',
  ),
  failing('a text longer than there is', model('"x".repeat(2 ** 31);'), 'RangeError: invalid repeat count'),
];

const depth: Hostile[] = [
  failing('deep recursion', model('const f = () => f() + 1; return f();'), 'InternalError: stack overflow'),
  failing(
    'recursion through a built-in function',
    model('const f = () => [1].map(f); return f();'),
    'InternalError: stack overflow',
  ),
  failing(
    'recursion through a replacer',
    model('const f = () => "a".replace(/a/, f); return f();'),
    'InternalError: stack overflow',
  ),
  failing('20,000 nested parentheses', model(`return ${'('.repeat(20000)}1${')'.repeat(20000)};`), 'stack overflow'),
  failing('20,000 nested arrays in the source', value(`${'['.repeat(20000)}${']'.repeat(20000)}`), 'stack overflow'),
  failing(
    'a regular expression nested 20,000 deep',
    model('new RegExp("(?:".repeat(20000) + ")".repeat(20000));'),
    'stack overflow',
  ),
  failing('JSON nested 100,000 deep', model('return JSON.parse("[".repeat(100000));'), 'stack overflow'),
  failing(
    'a value nested 100,000 deep',
    model('let a = []; for (let k = 0; k < 100000; k++) a = [a]; return a;'),
    'expected plain data, got nesting that is too deep or a cycle',
  ),
  failing(
    'a cycle',
    model('const a = {}; a.a = a; return a;'),
    'expected plain data, got nesting that is too deep or a cycle',
  ),
  failing(
    'a proxy of proxies',
    model('let p = {}; for (let k = 0; k < 1e5; k++) p = new Proxy(p, {}); return p.x;'),
    'InternalError: stack overflow',
  ),
];

const reach: Hostile[] = [
  failing('process', model('return process.env;'), "ReferenceError: 'process' is not defined"),
  failing('require', model('return require("fs");'), "ReferenceError: 'require' is not defined"),
  failing(
    'a static import',
    'import fs from "node:fs"; export default () => fs;',
    'generate.js imports "node:fs": a generator imports nothing',
  ),
  failing(
    'the module around it',
    'import { generate } from "kit.js"; export default () => generate;',
    'generate.js imports "kit.js": a generator imports nothing',
  ),
  failing('itself', 'import * as me from "generate.js"; export default () => me;', 'generate.js imports "generate.js"'),
  failing('a dynamic import', model('return import("node:fs");'), 'expected a value at once, got a promise'),
  failing('import.meta', model('return import.meta.url.slice(0, 4);'), 'cannot read property'),
  failing(
    'the constructor of a constructor',
    model('return kit.exp.constructor("return process")();'),
    "ReferenceError: 'process' is not defined",
  ),
  failing('indirect eval', model('return (0, eval)("process");'), "ReferenceError: 'process' is not defined"),
  failing('fetch', model('return fetch("http://127.0.0.1/");'), "ReferenceError: 'fetch' is not defined"),
  failing(
    'a web socket',
    model('return new WebSocket("ws://127.0.0.1/");'),
    "ReferenceError: 'WebSocket' is not defined",
  ),
  failing('a timer', model('return setTimeout(() => 1, 1);'), "ReferenceError: 'setTimeout' is not defined"),
  failing('the clock', model('return Date.now();'), "ReferenceError: 'Date' is not defined"),
  failing('a finer clock', model('return performance.now();'), "ReferenceError: 'performance' is not defined"),
  failing('random numbers of the engine', model('return Math.random();'), 'Math.random is not available'),
  failing(
    'shared memory',
    model('return new SharedArrayBuffer(8);'),
    "ReferenceError: 'SharedArrayBuffer' is not defined",
  ),
  failing('weak references', model('return new WeakRef({});'), "ReferenceError: 'WeakRef' is not defined"),
  failing(
    'WebAssembly',
    model('return new WebAssembly.Memory({ initial: 1 });'),
    "ReferenceError: 'WebAssembly' is not defined",
  ),
  failing(
    'a hook of the stack trace',
    model('Error.prepareStackTrace = (e, frames) => frames[0].getThis(); throw new Error("x");'),
    'TypeError',
  ),
  failing('the caller of a function', model('return (function f() { return f.caller; })();'), 'TypeError'),
  failing(
    'a walk over every global',
    model(
      'const seen = new Set(); const walk = (o) => { if (Object(o) !== o || seen.has(o)) return; seen.add(o); for (const k of Reflect.ownKeys(o)) { try { walk(o[k]); } catch {} } }; walk(globalThis); throw new Error(`reached ${[...seen].some((o) => o.name === "spawn" || o.name === "Worker")}`);',
    ),
    'Error: reached false',
  ),
];

const prototypes: Hostile[] = [
  failing(
    'a method of Object.prototype',
    model('Object.prototype.toJSON = () => "mine"; return {};'),
    'TypeError: object is not extensible',
  ),
  failing(
    'a setter of Array.prototype',
    model('Object.defineProperty(Array.prototype, "0", { set() { throw 1; } }); return [1];'),
    'TypeError',
  ),
  failing(
    'JSON.stringify replaced',
    model('JSON.stringify = () => "{}"; return { a: NaN };'),
    "TypeError: 'stringify' is read-only",
  ),
  failing('a function of the kit replaced', model('kit.exp = () => 0; return 1;'), "TypeError: 'exp' is read-only"),
  failing(
    'a prototype exchanged',
    model('Object.setPrototypeOf(Array.prototype, { then() {} }); return [];'),
    'TypeError',
  ),
  failing(
    'Symbol.hasInstance of Error',
    model('Object.defineProperty(Error, Symbol.hasInstance, { value: () => true }); throw 1;'),
    'TypeError',
  ),
  failing('globals of its own', model('globalThis.leak = 1; return 1;'), 'TypeError'),
  failing('parameters changed', model('parameters.n = 5; return parameters;'), 'TypeError'),
];

const values: Hostile[] = [
  failing('a function', value('{ generator: () => 1 }'), 'expected plain data, got a function', '/generator'),
  failing('toJSON of its own', value('{ a: { toJSON: () => 1 } }'), 'expected plain data, got a function', '/a/toJSON'),
  failing('a BigInt', value('[1n]'), 'expected plain data, got a BigInt', '/0'),
  failing('NaN', value('{ "a/b": [0 / 0] }'), 'expected finite numbers, got NaN', '/a~1b/0'),
  failing('infinity', value('-1 / 0'), 'expected finite numbers, got -Infinity', ''),
  failing('a sparse array', value('[1, , 3]'), 'expected arrays without holes, got a missing item', '/1'),
  failing(
    'an array of astronomic length',
    value('new Array(2 ** 32 - 1)'),
    'expected arrays without holes, got a missing item',
    '/0',
  ),
  failing('undefined in an array', value('[undefined]'), 'expected plain data, got undefined', '/0'),
  failing('a symbol', value('Symbol("s")'), 'expected plain data, got a symbol'),
  failing(
    'half of a surrogate pair',
    value('"\\ud800"'),
    'expected well-formed text, got a text with half of a surrogate pair',
  ),
  failing('a map', value('new Map()'), 'expected plain objects and arrays, got an instance of Map'),
  failing('a typed array', value('{ rates: new Float64Array(2) }'), 'got an instance of Float64Array', '/rates'),
  failing('a class of its own', 'class Model {} export default () => new Model();', 'got an instance of Model'),
  failing('an async function', 'export default async () => ({});', 'expected a value at once, got a promise'),
  failing('a thenable', value('{ then(resolve) { resolve(1); } }'), 'expected a value at once, got a promise'),
  failing(
    'await at the top',
    'await 1; export default () => 1;',
    'expected generate.js to run in one go, got await at its top level',
  ),
  failing('nothing returned', 'export default () => {};', 'expected "default" to return a value, got undefined'),
  failing(
    'no default export',
    'export const model = 1;',
    'expected generate.js to have a function as "default", got no such export',
  ),
  failing(
    'a default export that is no function',
    'export default {};',
    'expected generate.js to have a function as "default", got an object',
  ),
  failing('a syntax error', '\nexport default (;', 'generate.js, line 2: SyntaxError'),
  failing(
    'a thrown text',
    model('throw "\\u001b[31mred\\u0007\\u202e";'),
    'it threw "\\u001b[31mred\\u0007 ", which is no Error',
  ),
  failing('a message with control characters', model('throw new Error("\\u001b[2J\\u0000gone");'), 'Error:  [2J gone'),
  failing(
    'a thrown object that throws',
    model('throw { get message() { throw this; }, toString() { throw this; } };'),
    'it threw an object, which is no Error',
  ),
  failing(
    'a thrown proxy that throws',
    model('throw new Proxy(new Error(), { get() { throw 1; }, getPrototypeOf() { throw 2; } });'),
    'it threw something that cannot be shown',
  ),
  failing('a message without end', model('throw new Error("x".repeat(1e6));'), 'Error: xxxx'),
];

export const CORPUS: readonly Hostile[] = [...time, ...memory, ...depth, ...reach, ...prototypes, ...values];
