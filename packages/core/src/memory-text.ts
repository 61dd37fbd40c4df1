const UNITS = ['bytes', 'KiB', 'MiB', 'GiB', 'TiB', 'PiB', 'EiB'];

/** A number of bytes with three significant digits in a binary unit, for messages. */
export function memoryText(bytes: number): string {
  let size = bytes;
  let unit = 0;
  while (size >= 1024 && unit < UNITS.length - 1) {
    size /= 1024;
    unit += 1;
  }
  return `${Number(size.toPrecision(3))} ${UNITS[unit]}`;
}
