import { BLOCH_AXES } from '@thalweg/core';
import { Option, type Command } from 'commander';
import {
  addVerb,
  collect,
  examples,
  meanOption,
  modelArgument,
  setOption,
  withDefault,
  type RunVerb,
} from './program-parts.js';

/** What shows a model over its states: along the flow, and over a slice of state space. */
export function addPictureVerbs(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'flow', 'follow a state: relative entropy against what the proved constants promise')
    .addArgument(modelArgument())
    .addOption(setOption())
    .option('--from <state>', 'the state at time 0 (JSON, .npy or .mtx file, - for standard input)')
    .addOption(withDefault(new Option('--until <time>', 'last time'), 'where entropies have fallen by about 10^4'))
    .addOption(withDefault(new Option('--points <number>', 'times, evenly spaced from 0'), '101'))
    .option('--csv', 'print comma-separated values')
    .addOption(svgOption('the descent'))
    .addHelpText(
      'after',
      examples([
        'thalweg flow qubit.json --from rho.json',
        'thalweg flow qubit.json --from rho.json --until 5 --csv --svg descent.svg',
      ]),
    );

  addVerb(program, runVerb, 'relief', 'draw the contours of κ(ρ) over a slice of state space')
    .addArgument(modelArgument())
    .addOption(setOption())
    .addOption(withDefault(new Option('--axes <pair>', `of a qubit, two of ${BLOCH_AXES.join(', ')}`), 'x,z'))
    .addOption(
      new Option(
        '--through <state>',
        'lay the slice through σ and this state (JSON, .npy or .mtx file; give it twice for two)',
      ).argParser(collect),
    )
    .addOption(withDefault(new Option('--points <number>', 'states at which κ is evaluated, about'), 'by size'))
    .addOption(meanOption())
    .option('-o, --output <file>', 'write the picture (SVG) here instead of standard output')
    .option('--table', 'print a table of some of the values')
    .option('--csv', 'print all values, comma-separated')
    .addHelpText(
      'after',
      examples([
        'thalweg relief qubit.json -o relief.svg',
        'thalweg relief qubit.json --axes x,y --table',
        'thalweg relief two-qubits.json --through a.json --through b.json -o relief.svg',
      ]),
    );
}

/** `--svg`, beside what a verb prints. */
export function svgOption(what: string): Option {
  return new Option('--svg <file>', `also write a picture of ${what} here`);
}
