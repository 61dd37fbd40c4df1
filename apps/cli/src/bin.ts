import { VERSION } from './version.js';

const argv = process.argv.slice(2);
const INTERNAL_FAULT = 70;

// Without this Node.js would end with code 1, which means "no" here.
process.on('uncaughtException', (error) => {
  process.stderr.write(`thalweg: internal error: ${error.message}. This is a fault of thalweg: please report it\n`);
  // eslint-disable-next-line no-restricted-syntax -- threads may still run; what they compute is lost with the fault.
  process.exit(INTERNAL_FAULT);
});

// The version is asked for by scripts at every start: it needs neither the parser nor anything behind it.
if (argv.length === 1 && argv[0] === '--version') {
  process.stdout.write(`${VERSION}\n`);
} else {
  const { runCli } = await import('./run-cli.js');
  process.exitCode = await runCli(argv, process);
}
