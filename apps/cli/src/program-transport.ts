import { Argument, Option, type Command } from 'commander';
import { addVerb, examples, modelArgument, setOption, withDefault, type RunVerb } from './program-parts.js';

/** What measures states in the transport metric. */
export function addTransportVerbs(program: Command, runVerb: RunVerb): void {
  addVerb(program, runVerb, 'distance', 'bracket the transport distance of two states, and show the geodesic')
    .addArgument(modelArgument())
    .addArgument(new Argument('<from>', 'a state (JSON, .npy or .mtx file, - for standard input)'))
    .addArgument(new Argument('<to>', 'another'))
    .addOption(setOption())
    .addOption(withDefault(new Option('--width <number>', 'relative width of the bracket'), '1e-4'))
    .addOption(withDefault(new Option('--points <number>', 'states of the geodesic to show'), '9'))
    .option('-o, --output <file>', 'write the distance here as JSON')
    .addHelpText(
      'after',
      examples([
        'thalweg distance qubit.json rho.json sigma.json',
        'thalweg distance qubit.json rho.json sigma.json --width 1e-6 -o distance.json',
      ]),
    );

  addVerb(
    program,
    runVerb,
    'compare',
    'put the notions of curvature side by side: gradient estimate, EVI, geodesic convexity',
  )
    .addArgument(modelArgument())
    .addOption(setOption())
    .addOption(withDefault(new Option('--pairs <number>', 'random pairs of states'), '8'))
    .option('-o, --output <file>', 'write the comparison here as JSON')
    .addHelpText('after', examples(['thalweg compare qubit.json', 'thalweg compare qubit.json --pairs 20 --seed 7']));
}
