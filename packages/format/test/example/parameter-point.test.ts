import { expect, test } from 'vitest';
import { completePoint, readParameterValue } from '../../src/example/parameter-point.js';
import { parseExample } from '../../src/schema/parse-document.js';
import { refusal } from '../support/caught-error.js';
import { exampleDocument } from '../support/example-files.js';

const { parameters } = parseExample(JSON.stringify(exampleDocument()));
const named = (name: string) => {
  const found = parameters.find((parameter) => parameter.name === name);
  if (!found) throw new Error(`no parameter ${name}`);
  return found;
};

test('a point has every parameter, in the order of the declarations', () => {
  const point = completePoint(parameters, { kind: 'ring', n: 4 });
  expect(point).toEqual({ n: 4, g: 0.5, kind: 'ring', loops: false });
  expect(Object.keys(point)).toEqual(['n', 'g', 'kind', 'loops']);
  expect(refusal(() => completePoint(parameters, { g: 3 }, '/showcase/2'))).toEqual([
    'wrong-schema',
    '/showcase/2/g',
    'expected a number from 0 to 2 for g, got 3; give a value in the range',
  ]);
});

test.each([
  ['n', '3', 3],
  ['n', '3.0', 3],
  ['g', '0.25', 0.25],
  ['g', '1e-1', 0.1],
  ['g', '.5', 0.5],
  ['kind', 'ring', 'ring'],
  ['loops', 'true', true],
  ['loops', 'false', false],
])('reads %s=%s', (name, text, value) => {
  expect(readParameterValue(named(name), text)).toBe(value);
});

test.each([
  ['n', '7', 'expected a whole number from 2 to 6 for n, got 7'],
  ['n', '2.5', 'expected a whole number from 2 to 6 for n, got 2.5'],
  ['n', 'three', 'got the text "three"'],
  ['n', '', 'got the text ""'],
  ['g', 'NaN', 'expected a number from 0 to 2 for g, got the text "NaN"'],
  ['g', '0x1', 'got the text "0x1"'],
  ['kind', 'star', 'expected one of ring, line for kind, got the text "star"'],
  ['loops', 'yes', 'expected true or false for loops, got the text "yes"'],
])('refuses %s=%s', (name, text, says) => {
  const [code, , message] = refusal(() => readParameterValue(named(name), text));
  expect(code).toBe('usage');
  expect(message).toContain(says);
});
