import type { Readable } from 'node:stream';

/** Calls back with each line of a stream of UTF-8 text; once a line has more than `limit()` bytes, the stream is ended and `onOverflow` hears of it. */
export function readLines(
  stream: Readable,
  onLine: (line: string) => void,
  limit: () => number = () => Infinity,
  onOverflow: () => void = () => undefined,
): void {
  let parts: Buffer[] = [];
  let size = 0;
  stream.on('data', (chunk: Buffer) => {
    let rest = chunk;
    for (let end = rest.indexOf(10); end >= 0; end = rest.indexOf(10)) {
      const line = Buffer.concat([...parts, rest.subarray(0, end)]).toString('utf8');
      rest = rest.subarray(end + 1);
      parts = [];
      size = 0;
      onLine(line);
    }
    parts.push(rest);
    size += rest.length;
    if (size <= limit()) return;
    stream.destroy();
    onOverflow();
  });
}
