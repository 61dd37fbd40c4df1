/** Breaks a text at spaces into lines of at most `width` characters, each after `indent` spaces. Longer words stand alone. */
export function wrap(text: string, width: number, indent: number): string[] {
  return wrapPieces(text.split(/ +/), ' ', width, indent);
}

/** The same for pieces that are not to be broken, with a separator that stays at the end of a line. */
export function wrapPieces(pieces: readonly string[], separator: string, width: number, indent: number): string[] {
  return filled(pieces, separator, roomOf(width, indent)).map((line) => ' '.repeat(indent) + line);
}

/**
 * A sentence with formulas: broken beside no operator and before no single letter where that can be helped, and into lines of
 * about the same length.
 */
function wrapFormulas(text: string, width: number, indent: number): string[] {
  const room = roomOf(width, indent);
  const pieces = gluedFormulas(text).flatMap((piece) => (piece.length > room ? piece.split(' ') : [piece]));
  let lines = filled(pieces, ' ', room);
  for (let tighter = room - 1; tighter > room / 2; tighter -= 1) {
    const next = filled(pieces, ' ', tighter);
    if (next.length > lines.length || next.some((line) => line.length > tighter)) break;
    lines = next;
  }
  return lines.map((line) => ' '.repeat(indent) + line);
}

/** A label with text beside it, which hangs below itself at column `indent`; without room, the text goes below the label. */
export function hanging(label: string, text: string, width: number, indent: number): string[] {
  const lines = wrapFormulas(text, width, indent);
  if (label.trim() === '') return lines;
  if (label.length >= indent) return [label, ...lines];
  const [first = '', ...rest] = lines;
  return [label.padEnd(indent) + first.trimStart(), ...rest];
}

const NARROWEST_ROOM = 10;

function roomOf(width: number, indent: number): number {
  return Math.max(NARROWEST_ROOM, width - indent);
}

function filled(pieces: readonly string[], separator: string, room: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const piece of pieces) {
    const longer = line === '' ? piece : line + separator + piece;
    if (line === '' || longer.length <= room) {
      line = longer;
      continue;
    }
    lines.push((line + separator).trimEnd());
    line = piece;
  }
  if (line !== '') lines.push(line);
  return lines;
}

const OPERATORS = new Set(['=', '≤', '≥', '−', '+', '<', '>', '±']);

/** Words, with operators and what stands beside them as one piece, and single letters with the word before. */
function gluedFormulas(text: string): string[] {
  const pieces: string[] = [];
  let glueNext = false;
  for (const word of text.split(/ +/)) {
    const operator = OPERATORS.has(word);
    const letter = /^\p{L}[),;.:]*$/u.test(word);
    const last = pieces.length - 1;
    if (last >= 0 && (glueNext || operator || letter)) pieces[last] += ` ${word}`;
    else pieces.push(word);
    glueNext = operator;
  }
  return pieces;
}
