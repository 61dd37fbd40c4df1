/** The command line from a shell, cold: the run in the middle of five by the clock, and what it took of the processors. Build first. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { randomModels } from '../reference/support/random-models.js';
import { median, runCold } from './support/measure.js';
import { printTable, seconds } from './support/print-table.js';

const RUNS = 5;
const THALWEG = [process.execPath, 'apps/cli/bin/thalweg.js'];

const folder = mkdtempSync(join(tmpdir(), 'thalweg-bench-'));

/** A random model of the reference tests as a file. */
function randomModel(title: string): string {
  const model = randomModels().find(({ name }) => name === title);
  if (!model) throw new Error(`expected a random model "${title}", found none`);
  const path = join(folder, `${title.replaceAll(/\W+/g, '-')}.json`);
  writeFileSync(path, JSON.stringify(model.document));
  return path;
}

const example = (name: string): string => `examples/models/${name}.json`;

const COMMANDS: readonly [what: string, words: readonly string[], target: string][] = [
  ['version', ['--version'], '0.15 s'],
  ['a qubit: thermal', ['constants', example('thermal-qubit')], '1 s'],
  ['a qubit: random, with frequencies', ['constants', randomModel('balanced, blocks [2]')], '1 s'],
  ['a qubit: random, no symmetry', ['constants', randomModel('lindblad, blocks [2]')], '1 s'],
  ['three levels: depolarising', ['constants', example('depolarising-qutrit')], '5 s'],
  ['three levels: random, with frequencies', ['constants', randomModel('balanced, blocks [3]')], '5 s'],
  ['three levels: a thermal bath', ['constants', randomModel('davies, ohmic, blocks [3]')], '5 s'],
  [
    'two qubits: a thermal bath, two threads',
    ['constants', example('two-qubit-heisenberg-bath'), '--threads', '2'],
    '60 s',
  ],
];

try {
  const rows = COMMANDS.map(([what, words, target]) => {
    const runs = Array.from({ length: RUNS }, () => runCold([...THALWEG, ...words]));
    const { seconds: wall, processor } = median(runs);
    const quickest = Math.min(...runs.map((run) => run.seconds));
    return [what, seconds(wall), seconds(quickest), seconds(processor), target];
  });
  printTable(['thalweg', 'wall', 'quickest', 'processor', 'target'], rows);
} finally {
  rmSync(folder, { recursive: true, force: true });
}
