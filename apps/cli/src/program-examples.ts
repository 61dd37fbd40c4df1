import { Argument, type Command, Option } from 'commander';
import {
  addVerb,
  collect,
  exampleArgument,
  examples,
  meanOption,
  onlyOption,
  setOption,
  withDefault,
  type RunVerb,
} from './program-parts.js';

/** What starts an example, runs its generator, and packs it. */
export function addExampleVerbs(program: Command, runVerb: RunVerb): void {
  addDraft(program, runVerb);

  addVerb(program, runVerb, 'model', 'write the model that an example generates')
    .addArgument(exampleArgument())
    .addOption(setOption())
    .option('-o, --output <file>', 'write it here instead of standard output')
    .addHelpText('after', examples(['thalweg model depolarising --set n=3 -o m.json']));

  addSweep(program, runVerb);

  addVerb(program, runVerb, 'seal', 'check an example and pack it: an archive named by its SHA-256')
    .addArgument(exampleArgument())
    .addOption(withDefault(new Option('-o, --output <folder>', 'where to put the archive'), 'the current folder'))
    .addHelpText('after', examples(['thalweg seal depolarising -o archives']));

  addVerb(program, runVerb, 'reproduce', 'compute the showcase of an example again and compare with its record')
    .addArgument(exampleArgument())
    .option('--record', 'write the sheets into evidence/showcase.json of the folder')
    .addOption(onlyOption('record only these, separated by commas'))
    .addHelpText(
      'after',
      `
Exit codes: 0 models as recorded, brackets too or better, no claim refuted; 1 a
model or bracket contradicts the record or a claim is refuted; 2 a bracket is
weaker, nothing is recorded, or a claim is open.
${examples(['thalweg reproduce depolarising', 'thalweg reproduce depolarising --record --only gap,ge,cge'])}`,
    );
}

function addDraft(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'draft', 'start an example: asks on a terminal for what no option gives')
    .argument('<folder>', 'the folder to make')
    .option('--from <model>', 'start from this model (JSON file) instead of a small one')
    .addOption(withDefault(new Option('--name <name>', 'its name, a-z, 0-9 and hyphens'), 'that of the folder'))
    .option('--title <text>', 'one line')
    .option('--summary <text>', 'a sentence or two')
    .option('--author <name>', 'who wrote it')
    .option('--orcid <id>', "the author's ORCID iD")
    .option('--affiliation <text>', "the author's institution")
    .addOption(withDefault(new Option('--licence <expression>', 'SPDX licence expression'), 'MIT'))
    .addHelpText(
      'after',
      examples([
        'thalweg draft my-family',
        'thalweg draft my-family --from m.json --author "A. Author" --title "My family"',
      ]),
    );
}

function addSweep(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'sweep', 'compute constants over ranges of parameters of an example')
    .addArgument(new Argument('[example]', 'folder with example.json, or archive'))
    .addOption(
      new Option('--over <name=range>', 'n=2:6, g=0.1:2:0.1, kind=a,b (repeatable; the last runs fastest)').argParser(
        collect,
      ),
    )
    .addOption(setOption())
    .addOption(withDefault(onlyOption('only these, separated by commas'), 'gap'))
    .addOption(meanOption())
    .option('-o, --output <file>', 'keep finished points here; a sweep that was ended goes on from it')
    .option('--csv', 'print comma-separated values')
    .option('--differences <name>', 'also show differences between successive values of this parameter')
    .option('--queue <url>', 'have workers on any machines compute it, by a job queue in this PostgreSQL database')
    .option('--work', 'be such a worker until interrupted')
    .addHelpText(
      'after',
      examples([
        'thalweg sweep depolarising --over n=2:6 --only gap,cge -o sweep.jsonl',
        'thalweg sweep --work --queue postgres://user@host/sweeps',
        'thalweg sweep oscillator --over N=2:12 --only gap --differences N --csv',
      ]),
    );
}
