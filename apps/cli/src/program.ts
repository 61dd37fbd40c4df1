import { CERTIFIED_CONSTANTS, CONVENTION_NAMES } from '@thalweg/core';
import { Argument, Command, Option } from 'commander';
import { SHELLS } from './completion/shells.js';
import { addExampleVerbs } from './program-examples.js';
import {
  addVerb,
  collect,
  CONSTANT_WORDS,
  examples,
  meanOption,
  modelArgument,
  onlyOption,
  setOption,
  withDefault,
  withWords,
  type RunVerb,
} from './program-parts.js';
import { addPictureVerbs, svgOption } from './program-pictures.js';
import { addRegistryVerbs } from './program-registry.js';
import { addTransportVerbs } from './program-transport.js';
import { VERSION } from './version.js';

const EXIT_CODES = `
Exit codes:
  0 yes, 1 no, 2 undecided, 64 wrong usage, 65 bad document, 66 not found,
  69 unavailable, 70 internal fault, 73 cannot write, 75 try again,
  77 not allowed, 130 interrupted

Results go to standard output, everything else to standard error.
thalweg <verb> --help tells more about a verb.`;

/** The grammar of the whole command line: verbs, arguments, options, help. Parsing calls `runVerb`. */
export function createProgram(runVerb: RunVerb): Command {
  const program = new Command('thalweg')
    .description('Constants of quantum Markov semigroups, with a proof below and a witness above.')
    .usage('<verb> [arguments] [options]')
    .version(VERSION, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .helpCommand('help [verb]', 'print the help of a verb')
    .configureHelp({
      showGlobalOptions: true,
      commandUsage,
      optionDescription: describe,
      argumentDescription: describe,
    })
    .addHelpText('after', EXIT_CODES);
  for (const option of globalOptions()) program.addOption(option);

  addVerb(program, runVerb, 'inspect', 'tell what a model is: symmetry, state, fixed points, canonical form, spectrum')
    .addArgument(modelArgument())
    .addOption(setOption())
    .addOption(svgOption('the spectrum'))
    .addHelpText('after', examples(['thalweg inspect qubit.json', 'thalweg inspect --json - < qubit.json']));

  addVerb(program, runVerb, 'constants', 'print the sheet: every constant with its lower and upper bound')
    .addArgument(modelArgument())
    .addOption(setOption())
    .addOption(onlyOption('only these, separated by commas'))
    .addOption(meanOption())
    .addOption(svgOption('the brackets'))
    .option('--verbose', 'tell every iteration of the solver')
    .addHelpText('after', examples(['thalweg constants qubit.json', 'thalweg constants qubit.json --only gap,ge,cge']));

  addVerb(
    program,
    runVerb,
    'check',
    'decide claims about constants: exit code 0 all hold, 1 one is refuted, 2 undecided',
  )
    .addArgument(modelArgument())
    .addOption(setOption())
    .addOption(new Option('--at-least <constant=value>', 'claim a lower bound (repeatable)').argParser(collect))
    .addOption(new Option('--at-most <constant=value>', 'claim an upper bound (repeatable)').argParser(collect))
    .addOption(meanOption())
    .addHelpText('after', examples(['thalweg check qubit.json --at-least cge=1/2 --at-most mlsi=1']));

  addEvidenceVerbs(program, runVerb);
  addPictureVerbs(program, runVerb);
  addTransportVerbs(program, runVerb);

  addExampleVerbs(program, runVerb);
  addRegistryVerbs(program, runVerb);

  addVerb(program, runVerb, 'completion', 'print a completion script for a shell')
    .addArgument(withWords(new Argument('<shell>', 'which shell'), SHELLS))
    .addHelpText('after', examples(['source <(thalweg completion bash)', 'thalweg completion fish | source']));

  return program;
}

/** What makes evidence for an end of a bracket, and what checks it. */
function addEvidenceVerbs(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'witness', 'find the best upper bound of a constant, or its value at a given state')
    .addArgument(modelArgument())
    .addOption(setOption())
    .addArgument(withWords(new Argument('<constant>', 'which constant'), CONSTANT_WORDS))
    .option('--at <state>', 'evaluate at this state instead of searching (JSON file)')
    .addOption(meanOption())
    .option('-o, --output <file>', 'write the witness here instead of standard output')
    .addHelpText(
      'after',
      examples(['thalweg witness qubit.json ge -o w.json', 'thalweg witness qubit.json ge --at rho.json']),
    );

  addVerb(program, runVerb, 'certify', 'find a proof of a lower bound that others can check: a lift of the derivations')
    .addArgument(modelArgument())
    .addOption(setOption())
    .addArgument(withWords(new Argument('<constant>', 'which constant'), CERTIFIED_CONSTANTS))
    .option('-o, --output <file>', 'write the certificate here')
    .option('--verbose', 'tell every iteration of the solver')
    .addHelpText(
      'after',
      examples(['thalweg certify qubit.json cge -o c.json', 'thalweg verify c.json --model qubit.json']),
    );

  addVerb(program, runVerb, 'verify', 'check evidence against its model, independently of how it was found')
    .addArgument(new Argument('<evidence>', 'witness or certificate (JSON file, - for standard input)'))
    .option('--model <model>', 'the model it speaks about (JSON file), or an example')
    .addOption(setOption())
    .addHelpText('after', examples(['thalweg verify w.json --model qubit.json']));
}

function globalOptions(): Option[] {
  return [
    new Option('--json', 'print one JSON document, the stable interface for programs'),
    new Option('--quiet', 'print no notes and no progress'),
    new Option('--no-color', 'print no colours (as does a non-empty NO_COLOR)'),
    withDefault(new Option('--seed <number>', 'seed of every random choice'), '1'),
    withDefault(new Option('--threads <number>', 'threads; results do not depend on them'), 'one per processor'),
    withDefault(new Option('--time-limit <time>', 'stop searching after this long: 90s, 5m, 1h'), 'no limit'),
    withDefault(
      withWords(new Option('--convention <name>', 'convention of entropy constants'), CONVENTION_NAMES),
      CONVENTION_NAMES[0],
    ),
  ];
}

function describe(target: Argument | Option): string {
  const words = target.argChoices === undefined ? '' : `, one of ${target.argChoices.join(', ')}`;
  const fallback = target.defaultValueDescription === undefined ? '' : ` (default: ${target.defaultValueDescription})`;
  return `${target.description}${words}${fallback}`;
}

function commandUsage(command: Command): string {
  const names = command.parent === null ? command.name() : `${command.parent.name()} ${command.name()}`;
  return `${names} ${command.usage()}`;
}
