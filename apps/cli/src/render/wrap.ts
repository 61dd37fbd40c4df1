/** Breaks a text at spaces into lines of at most `width` characters, each after `indent` spaces. Longer words stand alone. */
export function wrap(text: string, width: number, indent: number): string[] {
  const room = Math.max(10, width - indent);
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/ +/)) {
    if (line !== '' && line.length + 1 + word.length > room) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  if (line !== '') lines.push(line);
  return lines.map((each) => ' '.repeat(indent) + each);
}
