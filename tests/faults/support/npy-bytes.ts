/** A NumPy file of version 1 with the given header fields and doubles. */
export function npyBytes(shape: string, values: readonly number[]): Uint8Array {
  const header = `{'descr': '<f8', 'fortran_order': False, 'shape': ${shape}, }`;
  const length = 64 * Math.ceil((10 + header.length + 1) / 64);
  const text = `${header.padEnd(length - 11)}\n`;
  const bytes = Buffer.alloc(length + 8 * values.length);
  bytes.write('\x93NUMPY\x01\x00', 'latin1');
  bytes.writeUInt16LE(text.length, 8);
  bytes.write(text, 10, 'latin1');
  values.forEach((value, k) => bytes.writeDoubleLE(value, length + 8 * k));
  return bytes;
}
