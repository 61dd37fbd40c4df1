/**
 * The least action of a discretised path beside the same minimised with NumPy and SciPy, one thread each, and whole brackets of the
 * transport distance; prints Markdown tables.
 *
 *     npm run bench -- transport
 *
 * Every one of ours runs in a process of its own; it is given as the first call, the compiler at work, and as the quickest of the
 * calls that follow.
 */
import { analyse, depolarising, transportDistance, transportModel } from '@thalweg/core';
import { formulaState } from '../../packages/core/test/transport/support/formula-states.js';
import { leastAction } from '../../packages/core/test/transport/support/straight-action.js';
import { type Outcome, inOwnProcess, least, runRival, timed } from './support/measure.js';
import { printTable, seconds } from './support/print-table.js';

const TURNS = 3;
const REPEATS = 100;
const AGREEMENT = 1e-7;

const ACTIONS = [
  [2, 16],
  [3, 16],
  [3, 32],
] as const;

const BRACKETS = [
  [2, 1e-4, 2],
  [3, 1e-3, 20],
] as const;

interface Both {
  readonly first: Outcome;
  readonly later: Outcome;
}

function compared([levels, pieces]: (typeof ACTIONS)[number], index: number): string[] {
  const turns = Array.from({ length: TURNS }, () => ({
    ours: inOwnProcess<Both>('action', String(index)),
    theirs: runRival('transport_action.py', [levels, pieces]),
  }));
  const [later, first] = [least(turns.map(({ ours }) => ours.later)), least(turns.map(({ ours }) => ours.first))];
  const theirs = least(turns.map((turn) => turn.theirs));
  const difference = Math.abs(later.value - theirs.value);
  if (!(difference <= AGREEMENT)) throw new Error(`expected equal actions, got ${later.value} and ${theirs.value}`);
  const times = [later, first, theirs].map((outcome) => seconds(outcome.seconds));
  const speed = `${(theirs.seconds / later.seconds).toPrecision(2)} ×`;
  return [`${levels} levels, ${pieces} pieces`, ...times, speed, '5 ×', difference.toExponential(0)];
}

function bracketed([levels, width, target]: (typeof BRACKETS)[number], index: number): string[] {
  const runs = Array.from({ length: TURNS }, () => inOwnProcess<Both>('bracket', String(index)));
  const [first, later] = [least(runs.map((run) => run.first)), least(runs.map((run) => run.later))];
  const times = [later, first].map((outcome) => seconds(outcome.seconds));
  return [`${levels} levels`, String(width), ...times, `${target} s`, later.value.toExponential(1)];
}

/** Relative width of the bracket of one distance. */
function bracket(levels: number, relativeWidth: number): number {
  const model = transportModel(analyse(depolarising(levels)));
  const ends = transportDistance(model, formulaState(levels, 0), formulaState(levels, 1), { relativeWidth });
  if (!ends.reached) throw new Error('expected the width to be reached');
  return 1 - ends.lower.value / ends.upper.value;
}

function firstAndLater(run: () => number, repeats: number): Both {
  const first = timed(run);
  return { first, later: least(Array.from({ length: repeats }, () => timed(run))) };
}

const [what, chosen] = process.argv.slice(2);
if (what === undefined) {
  const agree = 'values differ by';
  printTable(['action', 'Thalweg', 'first call', 'NumPy/SciPy', 'speed', 'target', agree], ACTIONS.map(compared));
  process.stdout.write('\n');
  printTable(['bracket', 'width', 'Thalweg', 'first call', 'target', 'width found'], BRACKETS.map(bracketed));
} else if (what === 'action') {
  const [levels, pieces] = ACTIONS[Number(chosen)] as (typeof ACTIONS)[number];
  process.stdout.write(JSON.stringify(firstAndLater(() => leastAction(levels, pieces), REPEATS)));
} else {
  const [levels, width] = BRACKETS[Number(chosen)] as (typeof BRACKETS)[number];
  process.stdout.write(JSON.stringify(firstAndLater(() => bracket(levels, width), 10)));
}
