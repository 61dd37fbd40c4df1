import { VERSION } from './version.js';

const argv = process.argv.slice(2);

// The version is asked for by scripts at every start: it needs neither the parser nor anything behind it.
if (argv.length === 1 && argv[0] === '--version') {
  process.stdout.write(`${VERSION}\n`);
} else {
  const { runCli } = await import('./run-cli.js');
  process.exitCode = await runCli(argv, process);
}
