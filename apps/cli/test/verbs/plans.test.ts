import { expect, test } from 'vitest';
import { planCheck } from '../../src/verbs/check/plan.js';
import { planCompletion } from '../../src/verbs/completion/plan.js';
import { planConstants } from '../../src/verbs/constants/plan.js';
import { planDraft } from '../../src/verbs/draft/plan.js';
import { planInspect } from '../../src/verbs/inspect/plan.js';
import { planCertify } from '../../src/verbs/certify/plan.js';
import { planModel } from '../../src/verbs/model/plan.js';
import { planReproduce } from '../../src/verbs/reproduce/plan.js';
import { planSeal } from '../../src/verbs/seal/plan.js';
import { planSweep } from '../../src/verbs/sweep/plan.js';
import { planVerify } from '../../src/verbs/verify/plan.js';
import { planWitness } from '../../src/verbs/witness/plan.js';

const machine = { processors: 3 };
const defaults = {
  json: false,
  quiet: false,
  color: true,
  seed: 1,
  threads: 3,
  timeLimit: null,
  convention: 'two-alpha',
};

test('a plan is fully defaulted', () => {
  expect(planInspect({ model: 'm.json' }, machine)).toEqual({ ...defaults, model: 'm.json', set: [], svg: null });
  expect(planConstants({ model: 'm.json' }, machine)).toEqual({
    ...defaults,
    model: 'm.json',
    set: [],
    only: null,
    mean: 'logarithmic',
    svg: null,
    verbose: false,
  });
  expect(planVerify({ evidence: 'w.json' }, machine)).toEqual({
    ...defaults,
    evidence: 'w.json',
    set: [],
    model: null,
  });
});

test('global options are read', () => {
  const raw = {
    model: '-',
    json: true,
    color: false,
    seed: '7',
    threads: '2',
    timeLimit: '5m',
    convention: 'four-alpha',
  };
  expect(planInspect(raw, machine)).toEqual({
    ...defaults,
    model: '-',
    set: [],
    svg: null,
    json: true,
    color: false,
    seed: 7,
    threads: 2,
    timeLimit: 300_000,
    convention: 'four-alpha',
  });
});

test.each([
  [{ seed: '-1' }, '--seed: expected a whole number from 0 to 9007199254740991, got "-1"'],
  [{ threads: 'all' }, '--threads: expected a whole number from 1 to 256, got "all"'],
  [{ timeLimit: 'soon' }, '--time-limit: expected a time above 0'],
  [{ convention: 'three-alpha' }, '--convention: expected one of two-alpha, four-alpha, one-alpha, got "three-alpha"'],
])('refuses %o', (raw, message) => {
  const plan = () => planInspect({ model: 'm.json', ...raw }, machine);
  expect(plan).toThrow(message);
  expect(plan).toThrow(expect.objectContaining({ code: 'usage' }));
});

test('check needs a claim and keeps their order', () => {
  expect(() => planCheck({ model: 'm.json' }, machine)).toThrow('expected at least one claim');
  const plan = planCheck({ model: 'm.json', atMost: ['mlsi=1'], atLeast: ['cge=0.5', 'gap=2'] }, machine);
  expect(plan.claims).toEqual([
    { constant: { id: 'cge', mean: null }, relation: 'at-least', bound: 0.5 },
    { constant: { id: 'gap', mean: null }, relation: 'at-least', bound: 2 },
    { constant: { id: 'mlsi', mean: null }, relation: 'at-most', bound: 1 },
  ]);
});

test('the mean of witness: in the constant first, then --mean, then logarithmic', () => {
  const meanOf = (constant: string, mean?: string) =>
    planWitness({ model: 'm.json', constant, ...(mean === undefined ? {} : { mean }) }, machine).mean;
  expect(meanOf('ge:left', 'right')).toBe('left');
  expect(meanOf('ge', 'right')).toBe('right');
  expect(meanOf('ge')).toBe('logarithmic');
});

test('certify takes the constants that a lift bounds', () => {
  const plan = planCertify({ model: 'm.json', constant: 'cge', verbose: true }, machine);
  expect(plan).toMatchObject({ model: 'm.json', constant: 'cge', output: null, verbose: true });
  expect(() => planCertify({ model: 'm.json', constant: 'gap' }, machine)).toThrow(
    'constant: expected one of cge, ge, clsi, mlsi, got "gap"',
  );
});

test('completion knows three shells', () => {
  expect(planCompletion({ shell: 'zsh' })).toEqual({ shell: 'zsh' });
  expect(() => planCompletion({ shell: 'tcsh' })).toThrow('shell: expected one of bash, zsh, fish, got "tcsh"');
});

test('an example may be given values for its parameters', () => {
  const plan = planModel({ example: 'ex', set: ['n=3', ' g = 0.5 '] }, machine);
  expect(plan).toEqual({
    ...defaults,
    example: 'ex',
    set: [
      { name: 'n', text: '3' },
      { name: 'g', text: '0.5' },
    ],
    output: null,
  });
  expect(() => planModel({ example: 'ex', set: ['n'] }, machine)).toThrow(
    '--set: expected a parameter and its value such as n=3, got "n"',
  );
});

test('a sweep needs ranges, and one way to print', () => {
  expect(planSweep({ example: 'ex', over: ['n=2:6'] }, machine)).toMatchObject({
    over: [{ name: 'n', text: '2:6' }],
    only: [{ id: 'gap', mean: null }],
    differences: null,
    csv: false,
  });
  const refused: [Record<string, unknown>, string][] = [
    [{}, 'expected ranges of parameters, got none'],
    [{ over: ['n=2'], csv: true, json: true }, 'expected one of --csv and --json, got both'],
    [{ over: ['n=2'], differences: 'm' }, '--differences: expected a parameter of --over, got "m"'],
    [{ over: ['n=2'], differences: 'n', json: true }, 'expected no --differences beside --json'],
  ];
  for (const [raw, says] of refused) expect(() => planSweep({ example: 'ex', ...raw }, machine)).toThrow(says);
});

test('what reproduce compares, the record decides', () => {
  expect(planReproduce({ example: 'ex' }, machine)).toMatchObject({ record: false, only: null });
  expect(() => planReproduce({ example: 'ex', only: 'gap' }, machine)).toThrow('--only: expected --record beside it');
});

test('an archive goes into the current folder unless told otherwise', () => {
  expect(planSeal({ example: 'ex' }, machine).output).toBe('.');
  expect(planDraft({ folder: 'd', licence: 'MIT' }, machine)).toMatchObject({
    folder: 'd',
    licence: 'MIT',
    title: null,
  });
});
