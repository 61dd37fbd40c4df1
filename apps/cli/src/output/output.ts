import type { OutputStream, Terminal } from '../terminal.js';
import { colours, type Colours } from './colours.js';
import { terminalWidth } from './terminal-width.js';

/** What a verb writes through: results on stdout, notes and progress on stderr. */
export interface Output {
  readonly json: boolean;
  readonly quiet: boolean;
  /** Colours for text on stdout; functions that change nothing where colours are off. */
  readonly colours: Colours;
  /** Columns of stdout's terminal, 80 when it is not one. */
  readonly width: number;
  /** Writes result text to stdout as it is. */
  result(text: string): void;
  /** Writes one JSON document to stdout, indented, with a final newline. */
  document(value: unknown): void;
  /** Writes one line to stderr, unless --quiet. */
  note(text: string): void;
  /** Replaces the progress line on stderr; nothing unless stderr is a terminal and not --quiet. Empty text removes it. */
  progress(text: string): void;
}

export interface OutputOptions {
  readonly json: boolean;
  readonly quiet: boolean;
  readonly color: boolean;
}

/** Output on a terminal's streams. */
export function createOutput(terminal: Terminal, options: OutputOptions): Output {
  const { stdout, stderr } = terminal;
  const showsProgress = stderr.isTTY === true && !options.quiet;
  let progressShown = false;

  const progress = (text: string) => {
    if (!showsProgress || (text === '' && !progressShown)) return;
    const room = terminalWidth(stderr) - 1;
    write(stderr, `\r\u001b[2K${text.slice(0, room)}`);
    progressShown = text !== '';
  };

  return {
    json: options.json,
    quiet: options.quiet,
    colours: colours(stdout, terminal.env, options.color),
    width: terminalWidth(stdout),
    result: (text) => {
      progress('');
      write(stdout, text);
    },
    document: (value) => {
      progress('');
      write(stdout, `${JSON.stringify(value, null, 2)}\n`);
    },
    note: (text) => {
      if (options.quiet) return;
      progress('');
      write(stderr, `${text}\n`);
    },
    progress,
  };
}

function write(stream: OutputStream, text: string): void {
  if (!stream.destroyed && text !== '') stream.write(text);
}
