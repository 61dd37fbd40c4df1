import type { Output } from './output.js';
import { writeFileAtomically } from './write-file-atomically.js';

/** Writes a picture to its file and says so. */
export async function writePicture(path: string, svg: string, output: Output): Promise<void> {
  await writeFileAtomically(path, svg);
  output.note(`wrote ${path}`);
}
