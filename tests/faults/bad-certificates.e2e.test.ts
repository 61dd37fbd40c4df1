import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { expectOneMessage, folderWith } from './support/refusal.js';

const MODELS = ['pauli-pair.json', 'thermal-qubit.json'] as const;
type Model = (typeof MODELS)[number];

const bundled = (name: string): string =>
  readFileSync(fileURLToPath(new URL(`../../examples/models/${name}`, import.meta.url)), 'utf8');

/** A folder with the models and one certificate of each. */
const here = folderWith(Object.fromEntries(MODELS.map((name) => [name, bundled(name)])));
const certificates = new Map<Model, string>();

beforeAll(async () => {
  await ensureBundle();
  for (const name of MODELS) {
    const made = await here.run(['certify', name, 'cge', '--json']);
    expect(made.exitCode).toBe(0);
    certificates.set(name, made.stdout);
  }
}, 120_000);

afterAll(() => here.remove());

interface Jump {
  matrix: unknown;
  rate: unknown;
  ratio: unknown;
  partner: unknown;
}

interface Certificate {
  bound: unknown;
  grade: unknown;
  algebra: unknown;
  model: unknown;
  state: unknown;
  jumps: [Jump, Jump];
  lift: unknown[][];
}

/** The certificate of a model after an edit, as text. */
function edited(name: Model, edit: (c: Certificate) => unknown): string {
  const document = JSON.parse(certificates.get(name) ?? '') as Certificate;
  edit(document);
  return JSON.stringify(document);
}

async function verify(text: string, name: Model) {
  const folder = folderWith({ 'c.json': text, [name]: bundled(name) });
  const result = await folder.run(['verify', 'c.json', '--model', name]);
  folder.remove();
  return result;
}

const swapped = ([a, b]: [Jump, Jump]): void => void ([a.ratio, b.ratio] = [b.ratio, a.ratio]);
const digits = (count: number): string => '7'.repeat(count);

test('both certificates are accepted as they are', async () => {
  for (const [name, text] of certificates) expect((await verify(text, name)).exitCode).toBe(0);
});

describe('a certificate that proves nothing is refused with 1, and the condition named', () => {
  test.each<[string, Model, (c: Certificate) => unknown, string]>([
    ['K above the truth by 1e-9', 'pauli-pair.json', (c) => (c.bound = '1000000001/1000000000'), 'left form'],
    ['an enclosed K above the truth by 1e-9', 'thermal-qubit.json', (c) => (c.bound = 0.500000001), 'left form'],
    ['the weights of the left and the right form swapped', 'thermal-qubit.json', (c) => swapped(c.jumps), 'σWσ⁻¹ = W/ratio for every jump'], // prettier-ignore
    ['left and right factors swapped', 'thermal-qubit.json', (c) => (c.lift = c.lift.map(([l, r, ...rest]) => [Number(r) < 0 ? r : 1 - Number(r), l, ...rest])), '∂L = L̂∂ on every matrix unit'], // prettier-ignore
    ['a coefficient of 10⁵⁰', 'pauli-pair.json', (c) => (c.lift[0] = [-1, -1, 0, 0, `-1${'0'.repeat(50)}`, '0']), '∂L = L̂∂ on every matrix unit'], // prettier-ignore
    ['a bound of 10³⁰⁰', 'pauli-pair.json', (c) => (c.bound = 1e300), 'shape of the certificate'],
    ['a stronger grade than it reaches', 'thermal-qubit.json', (c) => ((c.grade = 'exact'), (c.bound = 0.500000001)), 'left form'], // prettier-ignore
    ['a jump outside the algebra', 'pauli-pair.json', (c) => (c.jumps[0].matrix = [[0, 7, '1', '0']]), 'shape of the certificate'], // prettier-ignore
    ['a jump with a row too many', 'pauli-pair.json', (c) => (c.jumps[0].matrix = [[0, 1, '1', '0'], [1, 0, '1', '0'], [2, 2, '1', '0']]), 'shape of the certificate'], // prettier-ignore
    ['other blocks', 'pauli-pair.json', (c) => (c.algebra = [1, 1]), 'shape of the certificate'],
    ['a state with one entry', 'pauli-pair.json', (c) => (c.state = [[0, 0, '1', '0']]), 'state faithful, trace 1'],
  ])('%s', async (_, name, edit, condition) => {
    const { exitCode, stdout, stderr } = await verify(edited(name, edit), name);
    expect({ exitCode, stderr }).toEqual({ exitCode: 1, stderr: '' });
    expect(stdout).toMatch(/^refused +cge ≥ /);
    expect(stdout.split('\n').find((line) => line.startsWith('fails'))).toContain(condition);
  });
});

describe('a document that is no certificate of the model is refused with 65', () => {
  test.each<[string, (c: Certificate) => unknown, string[]]>([
    ['not a number as text', (c) => (c.bound = 'NaN'), ['expected a rational number such as "-3/4"', 'got the text "NaN"', '(at /bound of c.json)']], // prettier-ignore
    ['infinity as a coefficient', (c) => (c.lift[0] = [-1, -1, 0, 0, 'Infinity', '0']), ['got the text "Infinity"', '(at /lift/0/4 of c.json)']], // prettier-ignore
    ['a wrong digest', (c) => (c.model = digits(64)), ['expected the model with digest 7777', 'belongs to another model']], // prettier-ignore
    ['a digest that is none', (c) => (c.model = 'abc'), ['(at /model of c.json)']],
    ['a matrix as rows of numbers', (c) => (c.jumps[0].matrix = [[0, 1], [1, 0]]), ['(at /jumps/0/matrix/0 of c.json)']], // prettier-ignore
    ['a zero denominator', (c) => (c.bound = '1/0'), ['expected a denominator other than 0', '(at /bound']],
    ['an integer of ten million digits', (c) => (c.bound = digits(1e7)), ['(at /bound of c.json)']],
    ['no jumps', (c) => Object.assign(c, { jumps: [] }), ['(at /jumps of c.json)']],
    ['a grade of its own', (c) => (c.grade = 'proved'), ['"exact"', '"enclosed"', '"certified"', '(at /grade of c.json)']], // prettier-ignore
  ])('%s', async (_, edit, says) => {
    const { exitCode, stdout, stderr } = await verify(edited('pauli-pair.json', edit), 'pauli-pair.json');
    expect({ exitCode, stdout }, stderr.slice(0, 300)).toEqual({ exitCode: 65, stdout: '' });
    expect(stderr.length).toBeLessThan(1000);
    expectOneMessage(stderr, says);
  });

  test('a key that stands twice', async () => {
    const text = certificates.get('pauli-pair.json')?.replace('"bound":', '"bound": "1/2", "bound":') ?? '';
    const { exitCode, stdout, stderr } = await verify(text, 'pauli-pair.json');
    expect({ exitCode, stdout }).toEqual({ exitCode: 65, stdout: '' });
    expectOneMessage(stderr, ['bound', 'c.json']);
  });

  test('the certificate of another model', async () => {
    const { exitCode, stdout, stderr } = await verify(certificates.get('thermal-qubit.json') ?? '', 'pauli-pair.json');
    expect({ exitCode, stdout }).toEqual({ exitCode: 65, stdout: '' });
    expectOneMessage(stderr, ['expected the model with digest', 'the certificate belongs to another model']);
  });
});
