import { Argument, type Command, Option } from 'commander';
import { addVerb, exampleArgument, examples, withDefault, type RunVerb } from './program-parts.js';

/** What speaks to a registry of examples. */
export function addRegistryVerbs(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'sign-in', 'keep a token for a registry, read from standard input')
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg sign-in < token.txt']));

  addVerb(program, runVerb, 'sign-out', 'forget the token of a registry').addOption(registryOption());

  addVerb(program, runVerb, 'publish', 'publish a version of an example, for good')
    .addArgument(exampleArgument())
    .option('--listed', 'let everyone find it; without, its owner alone sees it')
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg publish depolarising --listed']));

  addVerb(program, runVerb, 'browse', 'list published examples, newest first')
    .argument('[words]', 'words in name, title, summary or keywords')
    .option('--owner <name>', 'only those of this member')
    .addOption(withDefault(new Option('--count <number>', 'how many'), '20'))
    .option('--cursor <cursor>', 'go on where a list ended')
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg browse "thermal qubit"', 'thalweg browse --owner mira --json']));

  addVerb(program, runVerb, 'read', 'show what a published version says of itself')
    .addArgument(nameArgument())
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg read mira/depolarising', 'thalweg read mira/depolarising@1.0.0 --json']));

  addVerb(program, runVerb, 'download', 'fetch a published version, check its digest, unpack it')
    .addArgument(nameArgument())
    .addOption(withDefault(new Option('-o, --output <folder>', 'a folder to make'), 'the name of the example'))
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg download mira/depolarising@1.0.0']));

  addVerb(program, runVerb, 'withdraw', 'take a version of yours out of what is browsed, with a reason')
    .addArgument(nameArgument())
    .option('--because <text>', 'the reason, which readers are shown')
    .addOption(registryOption())
    .addHelpText('after', examples(['thalweg withdraw mira/depolarising@1.0.0 --because "a rate has the wrong sign"']));
}

function nameArgument(): Argument {
  return new Argument('<name>', 'owner/slug, with @version or without');
}

function registryOption(): Option {
  return withDefault(new Option('--registry <address>', 'which registry'), 'THALWEG_REGISTRY, or this machine');
}
